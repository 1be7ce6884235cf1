export function originalKey(sha256: string): string {
  return `original/${sha256.slice(0, 2)}/${sha256}`
}

export function previewKey(sha256: string): string {
  return `preview/${sha256.slice(0, 2)}/${sha256}.jpg`
}

export function copyKey(sha256: string): string {
  return `copy/${sha256.slice(0, 2)}/${sha256}.jpg`
}

export function loggerKey(sha256: string): string {
  return `logger/${sha256}`
}

/** Folders of files that a row names. A small picture is made anew from its original. */
export const sweptFolders = ['original', 'copy', 'logger'] as const

/** The hash in a key of these; null where it has none. */
export function hashOf(key: string): string | null {
  return /(?:^|\/)([0-9a-f]{64})(?:\.jpg)?$/.exec(key)?.[1] ?? null
}
