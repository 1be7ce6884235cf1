export const outsideKeys = {
  ofStudy: (study: string) => `/api/studies/${encodeURIComponent(study)}/outside-results`,
  document: (id: string) => `/api/outside-results/${id}/document`,
}
