import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { once } from 'node:events'
import { mkdtemp, readdir, rm, utimes, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { afterAll, beforeAll, beforeEach, expect, it } from 'vitest'
import { POST as add } from '@/app/api/photos/route'
import { systemActor } from '@/lib/auth/actor'
import { pause } from '@/lib/cli/steps.mjs'
import { newId } from '@/lib/db/id'
import { storage } from '@/lib/files/storage'
import { registry } from '@/lib/jobs/registry'
import { originalKey } from '@/lib/photo/rules/keys'
import { askedJars, benchStudy, jarAt } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { s3Bucket } from '../support/s3'

// D04: a photo is whole or absent. Whatever happens while it arrives, a row is there only where its bytes are, under its
// hash, and what is left of the others is swept.

let t: TestDatabase
let technician: Signed
let pullJarId: string
let folder: string

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  const study = await benchStudy(t.db, (await t.person('formulator')).actor, 2)
  pullJarId = jarAt(await askedJars(t.db, study.studyId), 25, 1, 'watch').pullJarId
})
afterAll(() => t.close())

beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'stillstand-whole-'))
  process.env['STILLSTAND_FILES'] = folder
  return () => rm(folder, { recursive: true, force: true })
})

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex')
const picture = async (color: number) =>
  new Uint8Array(await new Jimp({ width: 320, height: 240, color }).getBuffer('image/jpeg'))

function formOf(bytes: Uint8Array, id: string): FormData {
  const now = new Date().toISOString()
  const data = new FormData()
  for (const [name, value] of Object.entries({ id, pullJarId, deviceNow: now, claimedAt: now }))
    data.set(name, value)
  data.set('file', new Blob([bytes as BlobPart], { type: 'image/jpeg' }), 'jar.jpg')
  return data
}
const send = (bytes: Uint8Array, id: string, key = newId()) =>
  call(add, { cookie: technician.cookie, body: formOf(bytes, id), key })

const rowsOf = (id: string) =>
  t.db.selectFrom('photo').select(['sha256', 'bytes']).where('id', '=', id).execute()
const arriving = () => readdir(path.join(folder, 'incoming')).catch(() => [])

/** One row, and under its hash the bytes that were sent; and nothing else is left lying. */
async function expectWhole(id: string, bytes: Uint8Array) {
  expect(await rowsOf(id)).toEqual([{ sha256: sha256(bytes), bytes: bytes.length }])
  expect(sha256((await storage().get(originalKey(sha256(bytes))))!)).toBe(sha256(bytes))
  expect(await arriving()).toEqual([])
}

async function expectAbsent(id: string, bytes: Uint8Array) {
  expect(await rowsOf(id)).toEqual([])
  expect(await storage().has(originalKey(sha256(bytes)))).toBe(false)
  expect(await arriving()).toEqual([])
}

const sweep = () =>
  registry
    .find((job) => job.queue === 'photo.sweep')!
    .handle({ db: t.db, actor: systemActor(), jobId: newId() }, {})

it('D04: an upload that breaks off leaves neither row nor file, and sent again it is there once', async () => {
  const [bytes, id] = [await picture(0x336699ff), newId()]
  const whole = new Uint8Array(await new Response(formOf(bytes, id)).arrayBuffer())
  const boundary = new TextDecoder().decode(whole.slice(2, 200)).split('\r\n')[0]!
  for (const isCut of [true, false]) {
    const body = new ReadableStream<Uint8Array>({
      start(stream) {
        stream.enqueue(whole.slice(0, Math.floor(whole.length * 0.6)))
        if (isCut) stream.error(new Error('the network is gone'))
        else stream.close()
      },
    })
    const request = new Request('http://lab.example/api/photos', {
      method: 'POST',
      body,
      duplex: 'half',
      headers: {
        ...{ host: 'lab.example', origin: 'http://lab.example', cookie: technician.cookie },
        ...{ 'idempotency-key': newId(), 'content-type': `multipart/form-data; boundary=${boundary}` },
      },
    } as RequestInit)
    const answer = await add(request, { params: Promise.resolve({}) })
    expect(answer.status, await answer.text()).toBeGreaterThanOrEqual(400)
    await expectAbsent(id, bytes)
  }
  expect((await send(bytes, id)).status).toBe(200)
  await expectWhole(id, bytes)
})

it('D04: what a server that was killed during an upload leaves behind is swept a day later, not before', async () => {
  // The application's own receiving, in a process of its own that is killed while bytes still come.
  const program = `
    const { receive } = await import('@/lib/http/upload')
    const head = '--b\\r\\ncontent-disposition: form-data; name="file"; filename="jar.jpg"\\r\\ncontent-type: image/jpeg\\r\\n\\r\\n'
    const body = new ReadableStream({ start(s) { s.enqueue(Buffer.from(head)); setInterval(() => s.enqueue(Buffer.alloc(65536, 1)), 5) } })
    const headers = { 'content-type': 'multipart/form-data; boundary=b' }
    await receive(new Request('http://lab.example', { method: 'POST', body, duplex: 'half', headers }), { maxBytes: 1e9, types: ['image/jpeg'] })`
  const server = spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '-e', program], {
    env: { ...process.env, STILLSTAND_FILES: folder },
    stdio: 'ignore',
  })
  const ended = once(server, 'exit')
  while ((await arriving()).length === 0 && server.exitCode === null) await pause(20)
  server.kill('SIGKILL')
  await ended
  const [left] = await arriving()
  expect(left, 'a part that nobody finishes').toBeDefined()

  await sweep()
  expect(await arriving(), 'it might still be arriving').toEqual([left])
  const longAgo = new Date(Date.now() - 25 * 3_600_000)
  await utimes(path.join(folder, 'incoming', left!), longAgo, longAgo)
  await writeFile(path.join(folder, 'incoming', 'fresh'), 'arriving')
  await sweep()
  expect(await arriving()).toEqual(['fresh'])
})

it('D04: where the folder takes no more there is no row; once it does, the same photo arrives', async () => {
  const [bytes, id] = [await picture(0x993366ff), newId()]
  // A full disk refuses to write; a file in the place of the folder does so too, and can be made without being root.
  await writeFile(path.join(folder, 'original'), 'no folder')
  const answer = await send(bytes, id)
  expect(answer.status).toBeGreaterThanOrEqual(500)
  expect(answer.body.error ?? answer.body).toBeTruthy()
  expect(await rowsOf(id)).toEqual([])
  expect(await arriving()).toEqual([])
  await rm(path.join(folder, 'original'))
  expect((await send(bytes, id)).status).toBe(200)
  await expectWhole(id, bytes)
})

it('D04: with files in S3 that fails, breaks off or is slow, a row is there only where the whole object is', async () => {
  const bucket = await s3Bucket()
  try {
    const [bytes, id] = [await picture(0x669933ff), newId()]
    for (const mood of ['fails', 'breaks off'] as const) {
      bucket.mood = mood
      expect((await send(bytes, id)).status, mood).toBeGreaterThanOrEqual(500)
      await expectAbsent(id, bytes)
    }
    bucket.mood = 'slow'
    const key = newId()
    const sending = [send(bytes, id, key), send(bytes, id, key)]
    await pause(300)
    expect(await rowsOf(id), 'no row before its object').toEqual([])
    const statuses = (await Promise.all(sending)).map((answer) => answer.status)
    expect(statuses).toContain(200)
    await expectWhole(id, bytes)
  } finally {
    bucket.close()
  }
})
