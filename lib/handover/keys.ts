export const handoverKeys = {
  all: '/api/handovers',
  read: (id: string) => `/api/handovers/${id}/read`,
}
