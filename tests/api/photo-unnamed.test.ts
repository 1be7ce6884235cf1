import { createHash } from 'node:crypto'
import { mkdtemp, rm, utimes } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, expect, it } from 'vitest'
import { POST as add } from '@/app/api/photos/route'
import { systemActor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import { storage } from '@/lib/files/storage'
import { registry } from '@/lib/jobs/registry'
import { keepWhole } from '@/lib/photo/commands/keep-whole'
import { copyKey, loggerKey, originalKey, previewKey } from '@/lib/photo/rules/keys'
import { askedJars, benchStudy, jarAt } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { s3Bucket } from '../support/s3'

// D04, the night after: a file whose row never came goes; one that a row names, or is about to, never does.

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
  folder = await mkdtemp(path.join(tmpdir(), 'stillstand-unnamed-'))
  process.env['STILLSTAND_FILES'] = folder
  return () => rm(folder, { recursive: true, force: true })
})

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex')
/** Another file for each grey. */
const picture = async (grey: number) =>
  new Uint8Array(
    await new Jimp({ width: 64, height: 48, color: grey * 0x01010100 + 0xff }).getBuffer('image/jpeg'),
  )
const twoDaysAgo = new Date(Date.now() - 48 * 3_600_000)

function send(bytes: Uint8Array) {
  const now = new Date().toISOString()
  const body = new FormData()
  for (const [name, value] of Object.entries({ id: newId(), pullJarId, deviceNow: now, claimedAt: now }))
    body.set(name, value)
  for (const name of ['file', 'copy'])
    body.set(name, new Blob([bytes as BlobPart], { type: 'image/jpeg' }), `${name}.jpg`)
  return call(add, { cookie: technician.cookie, body, key: newId() })
}

const sweep = () =>
  registry
    .find((job) => job.queue === 'photo.sweep')!
    .handle({ db: t.db, actor: systemActor(), jobId: newId() }, {})

/** As a server leaves it that dies between file and row, two days ago. */
async function left(key: string, bytes: Uint8Array) {
  await storage().put(key, bytes, 'image/jpeg')
  await utimes(path.join(folder, key), twoDaysAgo, twoDaysAgo)
}
const isThere = (key: string) => storage().has(key)

it('D04: originals, copies and logger files without a row go after a day with their small picture, all others stay', async () => {
  const [named, unnamed, fresh] = await Promise.all([0x11, 0x22, 0x33].map(picture))
  expect((await send(named!)).status).toBe(200)
  const namedKeys = [originalKey(sha256(named!)), copyKey(sha256(named!))]
  for (const key of namedKeys) await utimes(path.join(folder, key), twoDaysAgo, twoDaysAgo)
  const hash = sha256(unnamed!)
  const unnamedKeys = [originalKey(hash), copyKey(hash), loggerKey(hash), previewKey(hash)]
  for (const key of unnamedKeys) await left(key, unnamed!)
  await storage().put(originalKey(sha256(fresh!)), fresh!, 'image/jpeg')

  await sweep()
  expect(await Promise.all(unnamedKeys.map(isThere))).toEqual([false, false, false, false])
  expect(await Promise.all(namedKeys.map(isThere))).toEqual([true, true])
  expect(await isThere(originalKey(sha256(fresh!)))).toBe(true)
})

it('D04: every table that keeps the hash of a file is asked before the file goes', async () => {
  const { rows } = await sql<{ name: string }>`
    select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'sha256'
  `.execute(t.owner)
  expect(rows.map(({ name }) => name).sort()).toEqual(
    ['batch_photo', 'outside_result', 'photo', 'photo_copy', 'logger_file'].sort(),
  )
  const asked: string[] = []
  const spied = t.db.withPlugin({
    transformQuery: ({ node }) => {
      asked.push(JSON.stringify(node))
      return node
    },
    transformResult: ({ result }) => Promise.resolve(result),
  })
  await left(originalKey(sha256(await picture(0x44))), await picture(0x44))
  await registry
    .find((job) => job.queue === 'photo.sweep')!
    .handle({ db: spied, actor: systemActor(), jobId: newId() }, {})
  for (const { name } of rows)
    expect(
      asked.some((node) => node.includes(`"${name}"`)),
      name,
    ).toBe(true)
})

it('D04: a file that waits for its row while the sweep runs stays, however old it is', async () => {
  const bytes = await picture(0x55)
  const key = originalKey(sha256(bytes))
  await left(key, bytes)
  let go = () => {}
  const gate = new Promise<void>((resolve) => (go = resolve))
  let isKept = () => {}
  const kept = new Promise<void>((resolve) => (isKept = resolve))
  // The same photo is sent again: it finds the old file, and its row is not committed yet.
  const sending = t.db.transaction().execute(async (trx) => {
    await keepWhole(trx, key, bytes, 'image/jpeg')
    isKept()
    await gate
  })
  await kept
  await sweep()
  expect(await isThere(key)).toBe(true)
  go()
  await sending
})

it('D04: a photo sent while the sweep removes its old file is stored anew and has its row', async () => {
  const bytes = await picture(0x66)
  const key = originalKey(sha256(bytes))
  await left(key, bytes)
  let sending: ReturnType<typeof send> | undefined
  // In the sweep's place, between having found the file and having removed it.
  await t.db.transaction().execute(async (trx) => {
    await sql`select pg_advisory_xact_lock(hashtextextended(${key}, 0))`.execute(trx)
    sending = send(bytes)
    await new Promise((resolve) => setTimeout(resolve, 400))
    await storage().remove(key)
  })
  expect((await sending!).status).toBe(200)
  expect(sha256((await storage().get(key))!)).toBe(sha256(bytes))
})

it('D04: a store full of files without rows is another database’s, and is left alone', async () => {
  const hashes = Array.from({ length: 25 }, (_, i) => sha256(new Uint8Array([i, 200])))
  for (const hash of hashes) await left(originalKey(hash), new Uint8Array([1]))
  await expect(sweep()).rejects.toThrow(/^25 files in the store have no row\. Nothing was removed/)
  expect(await Promise.all(hashes.map((hash) => isThere(originalKey(hash))))).not.toContain(false)
})

it('D04: the same in S3, over pages of its list', async () => {
  const bucket = await s3Bucket()
  try {
    const named = await picture(0x77)
    expect((await send(named)).status).toBe(200)
    const hashes = [1, 2, 3, 4, 5].map((i) => sha256(new Uint8Array([i])))
    for (const hash of hashes) await storage().put(originalKey(hash), new Uint8Array([1]), 'image/jpeg')
    for (const [key, object] of bucket.objects)
      if (!key.includes(hashes[4]!)) bucket.objects.set(key, { ...object, at: twoDaysAgo })
    await sweep()
    expect([...bucket.objects.keys()].filter((key) => !key.startsWith('preview/')).sort()).toEqual(
      [originalKey(sha256(named)), copyKey(sha256(named)), originalKey(hashes[4]!)].sort(),
    )
  } finally {
    bucket.close()
  }
})
