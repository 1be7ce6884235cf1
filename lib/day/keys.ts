export const dayKeys = {
  all: '/api/days',
  one: (day: string) => `/api/days/${day}`,
  reviews: (day: string) => `/api/days/${day}/reviews`,
}
