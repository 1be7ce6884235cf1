export const holidayKeys = {
  list: '/api/holidays',
  one: (id: string) => `/api/holidays/${id}`,
}
