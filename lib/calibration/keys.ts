export const calibrationKeys = { list: '/api/calibrations' }
