export const peopleKey = '/api/people'
export const personKey = (id: string) => `/api/people/${id}`
