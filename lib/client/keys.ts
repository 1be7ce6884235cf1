export const clientsKey = '/api/clients'
