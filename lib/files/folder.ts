import { access, mkdir, open, readdir, readFile, rename, rm, stat } from 'node:fs/promises'
import path from 'node:path'
import { newId } from '@/lib/db/id'
import { incomingIn } from './incoming'
import type { Storage } from './storage'

/** Files in a folder: written beside, flushed, then moved to their name, so that a name never holds half a file. */
export function folderStorage(folder: string): Storage {
  const root = path.resolve(folder)
  return {
    async put(key, source) {
      const target = placeOf(root, key)
      const incoming = incomingIn(root)
      await mkdir(incoming, { recursive: true })
      await mkdir(path.dirname(target), { recursive: true })
      const beside = path.join(incoming, newId())
      try {
        await write(beside, typeof source === 'string' ? await readFile(source) : source)
        await rename(beside, target)
      } finally {
        await rm(beside, { force: true })
      }
    },
    async get(key) {
      return readFile(placeOf(root, key)).catch(absent)
    },
    async has(key) {
      return access(placeOf(root, key)).then(
        () => true,
        () => false,
      )
    },
    async *list(folder) {
      const all = await readdir(path.join(root, folder), { recursive: true, withFileTypes: true }).catch(none)
      for (const one of all) {
        if (!one.isFile()) continue
        const file = path.join(one.parentPath, one.name)
        const found = await stat(file).catch(absent)
        if (found) yield { key: path.relative(root, file).split(path.sep).join('/'), storedAt: found.mtimeMs }
      }
    },
    async remove(key) {
      await rm(placeOf(root, key), { force: true })
    },
  }
}

/** Keys are made by the program (hashes); the check keeps a mistake from leaving the folder. */
function placeOf(root: string, key: string): string {
  if (!/^[a-z]+\/[a-z0-9/]+(\.[a-z]+)?$/.test(key)) throw new Error(`Not a key of a stored file: ${key}`)
  return path.join(root, key)
}

async function write(file: string, bytes: Uint8Array): Promise<void> {
  const handle = await open(file, 'wx')
  try {
    await handle.writeFile(bytes)
    await handle.sync()
  } finally {
    await handle.close()
  }
}

function none(error: NodeJS.ErrnoException): [] {
  absent(error)
  return []
}

function absent(error: NodeJS.ErrnoException): null {
  if (error.code === 'ENOENT') return null
  throw error
}
