export const caseKey = (code: string) => `/api/cases/${code}`
