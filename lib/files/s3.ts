import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  NoSuchKey,
  NotFound,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3'
import { readFile } from 'node:fs/promises'
import type { Storage } from './storage'

export type S3Settings = {
  bucket: string
  endpoint: string | null
  region: string
  accessKeyId: string
  secretAccessKey: string
}

/** Files in a bucket. A put is all or nothing there, so nothing temporary is left behind. */
export function s3Storage(settings: S3Settings): Storage {
  const client = clientOf(settings)
  const at = (key: string) => ({ Bucket: settings.bucket, Key: key })
  return {
    async put(key, source, type) {
      const body = typeof source === 'string' ? await readFile(source) : source
      await client.send(new PutObjectCommand({ ...at(key), Body: body, ContentType: type }))
    },
    async get(key) {
      try {
        const { Body } = await client.send(new GetObjectCommand(at(key)))
        return Body ? await Body.transformToByteArray() : null
      } catch (error) {
        if (error instanceof NoSuchKey) return null
        throw error
      }
    },
    async has(key) {
      try {
        await client.send(new HeadObjectCommand(at(key)))
        return true
      } catch (error) {
        if (error instanceof NotFound) return false
        throw error
      }
    },
    async *list(folder) {
      let from: string | undefined
      do {
        const page = await client.send(
          new ListObjectsV2Command({
            Bucket: settings.bucket,
            Prefix: `${folder}/`,
            ...(from ? { ContinuationToken: from } : {}),
          }),
        )
        for (const { Key, LastModified } of page.Contents ?? [])
          // Without a time nobody knows its age: it is as if it came just now.
          if (Key) yield { key: Key, storedAt: LastModified?.getTime() ?? Date.now() }
        from = page.NextContinuationToken
      } while (from)
    },
    async remove(key) {
      await client.send(new DeleteObjectCommand(at(key)))
    },
  }
}

const clients = new Map<string, S3Client>()

function clientOf({ endpoint, region, accessKeyId, secretAccessKey }: S3Settings): S3Client {
  const name = JSON.stringify([endpoint, region, accessKeyId])
  const known = clients.get(name)
  if (known) return known
  const made = new S3Client({
    ...(endpoint ? { endpoint } : {}),
    region,
    forcePathStyle: true,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    credentials: { accessKeyId, secretAccessKey },
  })
  clients.set(name, made)
  return made
}
