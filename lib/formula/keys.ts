export const formulaKey = (code: string, number?: number) =>
  `/api/formulas/${encodeURIComponent(code)}${number ? `?version=${number}` : ''}`
export const compareAddress = (codes: readonly string[]) =>
  `/formulas/compare?${new URLSearchParams(codes.map((code) => ['code', code]))}`
