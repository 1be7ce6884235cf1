export function originalKey(sha256: string): string {
  return `original/${sha256.slice(0, 2)}/${sha256}`
}

export function previewKey(sha256: string): string {
  return `preview/${sha256.slice(0, 2)}/${sha256}.jpg`
}

export function copyKey(sha256: string): string {
  return `copy/${sha256.slice(0, 2)}/${sha256}.jpg`
}
