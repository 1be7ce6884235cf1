export const cycleKeys = {
  list: (studyStationId: string) => `/api/cycles?studyStation=${studyStationId}`,
  log: '/api/cycles',
  board: '/api/cycles/board',
  press: '/api/cycles/presses',
  correctHalf: (stepId: string) => `/api/cycles/${stepId}/correct`,
  correctBegin: (pressId: string) => `/api/cycles/presses/${pressId}/correct`,
}
