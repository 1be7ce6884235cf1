export const photoKeys = {
  add: '/api/photos',
  ofStudy: (study: string) => `/api/photos?study=${encodeURIComponent(study)}`,
  ofJar: (study: string, jar: string) =>
    `/api/photos?study=${encodeURIComponent(study)}&jar=${encodeURIComponent(jar)}`,
  preview: (id: string) => `/api/photos/${id}/preview`,
  copy: (id: string) => `/api/photos/${id}/copy`,
  proposal: (id: string) => `/api/photos/${id}/proposal`,
  original: (id: string) => `/api/photos/${id}/original`,
}
