import { env } from '@/lib/env'
import { folderStorage } from './folder'
import { s3Storage } from './s3'

/** Where files are kept. A key that has a file has a whole file. */
export type Storage = {
  /** From a whole file on disk (its path) or from bytes. */
  put(key: string, source: string | Uint8Array, type: string): Promise<void>
  get(key: string): Promise<Uint8Array | null>
  has(key: string): Promise<boolean>
  /** Whole files of a folder, in no order. */
  list(folder: string): AsyncIterable<StoredFile>
  /** Gone afterwards, also where it was not there. */
  remove(key: string): Promise<void>
}

/** `storedAt` in ms since 1970. */
export type StoredFile = { key: string; storedAt: number }

export function storage(): Storage {
  const { s3, filesFolder } = env()
  return s3 ? s3Storage(s3) : folderStorage(filesFolder)
}
