export const benchKeys = {
  today: '/api/bench',
  days: '/api/bench/days',
  revision: '/api/bench/revision',
  jar: (code: string) => `/api/bench/${encodeURIComponent(code)}`,
}
