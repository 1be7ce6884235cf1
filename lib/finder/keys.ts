export const findKey = (q: string) => `/api/find?${new URLSearchParams({ q })}`
