export const labKey = '/api/lab'
