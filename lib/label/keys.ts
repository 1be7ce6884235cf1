import type { LabelChoice } from './schema'

export const labelKeys = {
  page: (code: string, choice: Partial<LabelChoice> = {}) =>
    `/studies/${encodeURIComponent(code)}/labels${questionOf(choice)}`,
  pdf: (code: string, choice: LabelChoice) =>
    `/api/studies/${encodeURIComponent(code)}/labels${questionOf(choice)}`,
}

function questionOf(choice: Partial<LabelChoice>): string {
  const given = Object.entries(choice).flatMap(([key, value]) =>
    value === '' ? [] : [[key, String(value)] as [string, string]],
  )
  return given.length === 0 ? '' : `?${new URLSearchParams(given)}`
}
