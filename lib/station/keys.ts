export const stationKeys = {
  list: '/api/stations',
  one: (id: string) => `/api/stations/${id}`,
  record: (id: string) => `/api/stations/${id}/temperatures`,
  loggerFiles: (id: string) => `/api/stations/${id}/logger-files`,
  moves: (id: string) => `/api/stations/${id}/moves`,
  downtimes: (id: string) => `/api/stations/${id}/downtimes`,
  cancelDowntime: (id: string, downtimeId: string) => `/api/stations/${id}/downtimes/${downtimeId}/cancel`,
}
