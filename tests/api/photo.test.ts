import { createHash } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as list, POST as add } from '@/app/api/photos/route'
import { GET as original } from '@/app/api/photos/[id]/original/route'
import { GET as preview } from '@/app/api/photos/[id]/preview/route'
import { newId } from '@/lib/db/id'
import { sql } from 'kysely'
import { askedJars, benchStudy, jarAt, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let technician: Signed
let formulator: Signed
let client: Signed
let study: BenchStudy
let pullJarId: string
let folder: string

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'stillstand-photos-'))
  process.env['STILLSTAND_FILES'] = path.join(folder, 'files')
  process.env['DATA_FOLDER'] = folder
  t = await testDatabase()
  await t.lab()
  technician = await t.person('technician')
  formulator = await t.person('formulator')
  client = await t.person('client')
  study = await benchStudy(t.db, formulator.actor, 2)
  pullJarId = jarAt(await askedJars(t.db, study.studyId), 25, 1, 'watch').pullJarId
})
afterAll(async () => {
  await t.close()
  await rm(folder, { recursive: true, force: true })
})

const form = (bytes: Uint8Array, id = newId(), name = 'jar.jpg') => {
  const data = new FormData()
  data.set('id', id)
  data.set('pullJarId', pullJarId)
  data.set('deviceNow', new Date().toISOString())
  data.set('claimedAt', new Date().toISOString())
  data.set('file', new Blob([bytes as BlobPart], { type: 'image/jpeg' }), name)
  return data
}
const send = (bytes: Uint8Array, id?: string, name?: string) =>
  call(add, { cookie: technician.cookie, body: form(bytes, id, name) })
const picture = async (width: number, height: number, type: 'image/jpeg' | 'image/png' = 'image/jpeg') =>
  new Uint8Array(await new Jimp({ width, height, color: 0x336699ff }).getBuffer(type))
/** Signature and IHDR of a PNG that claims these sides and holds nothing. */
const claimedPng = (width: number, height: number) => {
  const bytes = Buffer.alloc(64)
  Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13]).copy(bytes)
  bytes.write('IHDR', 12)
  bytes.writeUInt32BE(width, 16)
  bytes.writeUInt32BE(height, 20)
  bytes[24] = 8
  bytes[25] = 2
  // file-type reads chunks on until image data.
  bytes.writeUInt32BE(0, 33)
  bytes.write('IDAT', 37)
  return new Uint8Array(bytes)
}
const count = async () =>
  (
    await t.db
      .selectFrom('photo')
      .select(({ fn }) => fn.countAll<number>().as('n'))
      .executeTakeFirstOrThrow()
  ).n

describe('a photo', () => {
  it('R08: a 12-megapixel JPEG comes back byte for byte under the same SHA-256', async () => {
    const bytes = await picture(4000, 3000)
    const sha256 = createHash('sha256').update(bytes).digest('hex')
    const id = newId()
    expect((await send(bytes, id)).status).toBe(200)
    const row = await t.db.selectFrom('photo').selectAll().where('id', '=', id).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ sha256, width: 4000, height: 3000, bytes: bytes.length })
    const answer = await call(original, { cookie: technician.cookie, params: { id } })
    const back = new Uint8Array(await answer.response.arrayBuffer())
    expect(createHash('sha256').update(back).digest('hex')).toBe(sha256)
    expect(answer.headers.get('content-disposition')).toMatch(/^attachment/)
    const jobs = await sql<{
      data: { sha256: string }
    }>`select data from pgboss.job where name = 'photo.preview'`.execute(t.db)
    expect(jobs.rows.map((job) => job.data.sha256)).toContain(sha256)
  })

  it('is shown small: 480 px wide, made at the first look and kept', async () => {
    const id = newId()
    await send(await picture(900, 600, 'image/png'), id, 'jar.png')
    for (let look = 0; look < 2; look += 1) {
      const answer = await call(preview, { cookie: technician.cookie, params: { id } })
      expect(answer.headers.get('content-type')).toBe('image/jpeg')
      const small = await Jimp.fromBuffer(Buffer.from(await answer.response.arrayBuffer()))
      expect([small.width, small.height]).toEqual([480, 320])
    }
  })

  it('D05: sent twice it is kept once, and another file under its id is refused', async () => {
    const id = newId()
    const bytes = await picture(40, 30)
    expect((await send(bytes, id)).status).toBe(200)
    expect((await send(bytes, id)).status).toBe(200)
    expect((await send(await picture(50, 30), id)).status).toBe(409)
    expect(await t.db.selectFrom('photo').select('id').where('id', '=', id).execute()).toHaveLength(1)
  })

  it('is listed by study and jar', async () => {
    const rows = await call(list, { cookie: technician.cookie, query: { study: study.code } })
    expect(rows.body.length).toBeGreaterThan(1)
    expect(rows.body[0]).toMatchObject({ label: 'week 1', takenBy: technician.actor.initials })
  })

  it('a client sees those of its own shared studies alone', async () => {
    const { id } = await t.db.selectFrom('photo').select('id').limit(1).executeTakeFirstOrThrow()
    const look = () => call(preview, { cookie: client.cookie, params: { id } })
    expect((await look()).status).toBe(404)
    expect((await call(original, { cookie: client.cookie, params: { id } })).status).toBe(404)
    await t.owner.transaction().execute(async (trx) => {
      await sql`select set_config('app.actor_id', ${formulator.actor.personId}, true)`.execute(trx)
      await trx
        .updateTable('study')
        .set({ clientId: client.actor.clientId, isShared: true })
        .where('id', '=', study.studyId)
        .execute()
    })
    expect((await look()).status).toBe(200)
    expect((await call(add, { cookie: client.cookie, body: form(await picture(4, 4)) })).status).toBe(403)
  })
})

describe('A08: what is no photo is refused and leaves nothing', () => {
  const svg = new TextEncoder().encode(
    '<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>',
  )
  const heic = new Uint8Array(
    Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic'), Buffer.alloc(60)]),
  )
  it.each<[string, () => Uint8Array, number, RegExp]>([
    ['an SVG named as a JPEG', () => svg, 415, /not one of/],
    ['a HEIC photo, saying what to do', () => heic, 415, /most compatible format/],
    ['a PNG of 30,000 × 30,000', () => claimedPng(30_000, 30_000), 413, /900 megapixels/],
    [
      'only the beginning of a JPEG',
      () => new Uint8Array([0xff, 0xd8, 0xff, 0xe0, 0, 4, 0, 0]),
      415,
      /is none/,
    ],
    ['an empty file', () => new Uint8Array(), 422, /empty/],
    ['26 MB', () => new Uint8Array(26 * 1024 * 1024), 413, /larger than/],
  ])('%s', async (_name, bytes, status, sentence) => {
    const before = await count()
    const answer = await send(bytes())
    expect(answer.body.error.sentence).toMatch(sentence)
    expect(answer.status).toBe(status)
    expect(await count()).toBe(before)
  })

  it('a name that climbs is text only', async () => {
    const id = newId()
    expect((await send(await picture(8, 8), id, '../../etc/passwd')).status).toBe(200)
    const { originalName } = await t.db
      .selectFrom('photo')
      .select('originalName')
      .where('id', '=', id)
      .executeTakeFirstOrThrow()
    expect(originalName).not.toContain('/')
  })
})
