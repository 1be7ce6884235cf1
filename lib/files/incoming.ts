import { readdir, rm, stat } from 'node:fs/promises'
import path from 'node:path'

/** Where files lie while they arrive, beside those that are whole; nothing reads from here. */
export const incomingIn = (filesFolder: string) => path.join(path.resolve(filesFolder), 'incoming')

/** Removes what an interrupted upload left behind longer ago than this, and says how many. */
export async function sweepIncoming(filesFolder: string, olderThanMs: number): Promise<number> {
  const folder = incomingIn(filesFolder)
  let removed = 0
  for (const name of await readdir(folder).catch(none)) {
    const file = path.join(folder, name)
    const found = await stat(file).catch(none)
    // Gone meanwhile: it has arrived.
    if (Array.isArray(found) || Date.now() - found.mtimeMs < olderThanMs) continue
    await rm(file, { force: true })
    removed += 1
  }
  return removed
}

function none(error: NodeJS.ErrnoException): [] {
  if (error.code === 'ENOENT') return []
  throw error
}
