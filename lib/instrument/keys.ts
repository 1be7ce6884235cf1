export const instrumentKeys = {
  list: '/api/instruments',
  one: (id: string) => `/api/instruments/${id}`,
  checks: (id: string) => `/api/instruments/${id}/checks`,
}
