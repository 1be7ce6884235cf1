export const formulaAnswersKey = (code: string) => `/api/formulas/${encodeURIComponent(code)}/answers`
