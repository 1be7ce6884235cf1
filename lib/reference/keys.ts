export const referenceKeys = { add: '/api/references' }
