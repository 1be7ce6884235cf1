export const flagKeys = {
  one: (number: number) => `/api/flags/${number}`,
  comment: (number: number) => `/api/flags/${number}/comments`,
  answer: (number: number) => `/api/flags/${number}/answer`,
  close: (number: number) => `/api/flags/${number}/close`,
  setAside: (number: number) => `/api/flags/${number}/set-aside`,
}
