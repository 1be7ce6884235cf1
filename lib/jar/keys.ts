export const jarKeys = {
  mishaps: (code: string) => `/api/jars/${encodeURIComponent(code)}/mishaps`,
  one: (code: string) => `/api/jars/${encodeURIComponent(code)}`,
}
