export const lotKeys = { list: '/api/lots', one: (id: string) => `/api/lots/${id}` }
