export const protocolKeys = {
  list: '/api/protocols',
  one: (code: string) => `/api/protocols/${encodeURIComponent(code)}`,
  versions: (code: string) => `/api/protocols/${encodeURIComponent(code)}/versions`,
  version: (code: string, number: number) => `/api/protocols/${encodeURIComponent(code)}/versions/${number}`,
  approve: (code: string, number: number) =>
    `/api/protocols/${encodeURIComponent(code)}/versions/${number}/approve`,
}
