import { once } from 'node:events'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { pause } from '@/lib/cli/steps.mjs'

export type Bucket = {
  /** Objects by their key, with the time they were put. */
  objects: Map<string, { body: Buffer; at: Date }>
  mood: 'well' | 'fails' | 'breaks off' | 'slow'
  close: () => void
}

/** A bucket that the application is pointed at: as much of S3's own answers as it uses, lists in pages of two. */
export async function s3Bucket(): Promise<Bucket> {
  const objects: Bucket['objects'] = new Map()
  const server = createServer(async (request, response) => {
    const address = new URL(request.url!, 'http://s3')
    const key = address.pathname.replace(/^\/photos\/?/, '')
    if (request.method === 'DELETE') {
      objects.delete(key)
      return void response.writeHead(204).end()
    }
    if (request.method === 'PUT') {
      if (bucket.mood === 'breaks off') return void request.once('data', () => request.socket.destroy())
      const parts: Buffer[] = []
      for await (const part of request) parts.push(part as Buffer)
      if (bucket.mood === 'fails') return void response.writeHead(500).end()
      if (bucket.mood === 'slow') await pause(1_000)
      objects.set(key, { body: Buffer.concat(parts), at: new Date() })
      return void response.writeHead(200).end()
    }
    if (address.searchParams.has('list-type'))
      return void response.writeHead(200, { 'content-type': 'application/xml' }).end(listOf(address))
    const found = objects.get(key)
    response.writeHead(found ? 200 : 404).end(request.method === 'GET' ? found?.body : undefined)
  })

  function listOf({ searchParams }: URL): string {
    const prefix = searchParams.get('prefix') ?? ''
    const keys = [...objects.keys()].filter((key) => key.startsWith(prefix)).sort()
    const from = Number(searchParams.get('continuation-token') ?? 0)
    const rows = keys
      .slice(from, from + 2)
      .map(
        (key) =>
          `<Contents><Key>${key}</Key><LastModified>${objects.get(key)!.at.toISOString()}</LastModified></Contents>`,
      )
    const isMore = from + 2 < keys.length
    const next = isMore ? `<NextContinuationToken>${from + 2}</NextContinuationToken>` : ''
    return `<?xml version="1.0"?><ListBucketResult><IsTruncated>${isMore}</IsTruncated>${next}${rows.join('')}</ListBucketResult>`
  }

  await once(server.listen(0, '127.0.0.1'), 'listening')
  const settings = {
    S3_ENDPOINT: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    S3_BUCKET: 'photos',
    S3_ACCESS_KEY_ID: 'test',
    S3_SECRET_ACCESS_KEY: 'test',
  }
  Object.assign(process.env, settings)
  const bucket: Bucket = {
    objects,
    mood: 'well',
    close() {
      for (const name of Object.keys(settings)) delete process.env[name]
      server.close()
    },
  }
  return bucket
}
