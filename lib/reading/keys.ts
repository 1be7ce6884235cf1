export const readingKeys = {
  ofStudy: (study: string) => `/api/readings?study=${encodeURIComponent(study)}`,
  history: (id: string) => `/api/readings/${id}`,
  correct: (id: string) => `/api/readings/${id}/correct`,
  void: (id: string) => `/api/readings/${id}/void`,
}
