export const batchPhotoKeys = {
  add: (code: string) => `/api/batches/${encodeURIComponent(code)}/photos`,
  preview: (code: string, id: string) => `${batchPhotoKeys.add(code)}/${id}/preview`,
  original: (code: string, id: string) => `${batchPhotoKeys.add(code)}/${id}/original`,
}
export const batchKey = (code: string) => `/api/batches/${encodeURIComponent(code)}`
