import { createHash } from 'node:crypto'
import { mkdtemp, readdir, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as list, POST as add } from '@/app/api/photos/route'
import { GET as copy, POST as addCopy } from '@/app/api/photos/[id]/copy/route'
import { GET as proposal } from '@/app/api/photos/[id]/proposal/route'
import { GET as original } from '@/app/api/photos/[id]/original/route'
import { GET as preview } from '@/app/api/photos/[id]/preview/route'
import { GET as days } from '@/app/api/bench/days/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import type { BenchDays } from '@/lib/bench/queries/days'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { sql } from 'kysely'
import { askedJars, benchStudy, jarAt, layered, type AskedJar, type BenchStudy } from '../support/bench-study'
import { call } from '../support/call'
import { drawnPhoto } from '../support/drawn-photo'
import { place, withCameraNotes } from '../support/camera-notes'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'

let t: TestDatabase
let technician: Signed
let formulator: Signed
let client: Signed
let auditor: Signed
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
  auditor = await t.person('qa')
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

describe('what the camera wrote into a photo', () => {
  it('R08: stays in the original that is kept and audited; others get the picture without the place', async () => {
    const plain = Buffer.from(await picture(2000, 1500))
    const bytes = withCameraNotes(plain, 6)
    const sha256 = createHash('sha256').update(bytes).digest('hex')
    const id = newId()
    expect((await send(bytes, id)).status).toBe(200)
    const bytesFor = async (cookie: string) =>
      Buffer.from(await (await call(original, { cookie, params: { id } })).response.arrayBuffer())
    const audited = await bytesFor(auditor.cookie)
    expect(createHash('sha256').update(audited).digest('hex')).toBe(sha256)
    expect(audited.includes(place)).toBe(true)
    const seen = await bytesFor(technician.cookie)
    expect(seen.includes(place)).toBe(false)
    expect(seen.includes('GPS')).toBe(false)
    // The compressed picture itself is untouched, and still says how it is turned.
    const scan = plain.subarray(plain.indexOf(Buffer.from([0xff, 0xdb])))
    expect(seen.includes(scan)).toBe(true)
    const upright = await Jimp.fromBuffer(seen)
    expect([upright.width, upright.height]).toEqual([1500, 2000])
  })

  it('its small picture stands upright and says nothing of it', async () => {
    const id = newId()
    await send(withCameraNotes(await picture(900, 600), 6), id)
    const answer = await call(preview, { cookie: technician.cookie, params: { id } })
    const small = Buffer.from(await answer.response.arrayBuffer())
    expect(small.includes('Exif')).toBe(false)
    const { width, height } = await Jimp.fromBuffer(small)
    expect([width, height]).toEqual([480, 720])
  })
})

describe('the copy that is measured on', () => {
  const sendCopy = (id: string, bytes: Uint8Array) => {
    const data = new FormData()
    data.set('file', new Blob([bytes as BlobPart], { type: 'image/jpeg' }), 'copy.jpg')
    return call(addCopy, { cookie: technician.cookie, params: { id }, body: data })
  }

  it('brings a proposal near the drawn layers, and the first copy stays', async () => {
    const { bytes, lines, height } = drawnPhoto(5010, 800)
    const id = newId()
    await send(bytes, id)
    const none = await call(proposal, { cookie: technician.cookie, params: { id } })
    expect(none.status).toBe(404)
    expect((await sendCopy(id, bytes)).body).toMatchObject({ height })
    expect((await sendCopy(id, await picture(600, 800))).body).toMatchObject({ height })
    const { body } = await call(proposal, { cookie: technician.cookie, params: { id } })
    const fill = lines!.base - lines!.fillTop
    for (const line of ['fillTop', 'topEdge', 'bottomEdge', 'base'] as const)
      expect(Math.abs(body.lines[line] - lines![line]) / fill).toBeLessThan(0.015)
    const back = await call(copy, { cookie: auditor.cookie, params: { id } })
    expect(Buffer.from(await back.response.arrayBuffer()).equals(Buffer.from(bytes))).toBe(true)
  })

  it('comes along with its photo; one that is none leaves the photo as it is, and sent again it is the first that stays', async () => {
    const { bytes, height } = drawnPhoto(5010, 800)
    const sendBoth = (id: string, beside: Uint8Array, photo = bytes) => {
      const data = form(photo, id)
      data.set('copy', new Blob([beside as BlobPart], { type: 'image/jpeg' }), 'copy.jpg')
      return call(add, { cookie: technician.cookie, body: data })
    }
    const copyOf = (id: string) =>
      t.db.selectFrom('photoCopy').select(['height', 'madeBy']).where('photoId', '=', id).execute()
    const id = newId()
    expect((await sendBoth(id, bytes)).status).toBe(200)
    expect(await copyOf(id)).toEqual([{ height, madeBy: technician.actor.personId }])
    expect((await call(proposal, { cookie: technician.cookie, params: { id } })).status).toBe(200)
    expect((await sendBoth(id, await picture(600, 800))).status).toBe(200)
    expect(await copyOf(id)).toHaveLength(1)

    const without = newId()
    expect((await sendBoth(without, await picture(900, 900), await picture(600, 800))).status).toBe(200)
    expect(await copyOf(without)).toEqual([])
    const text = new TextEncoder().encode('no picture')
    expect((await sendBoth(newId(), text)).status).toBe(415)
    expect(await readdir(path.join(folder, 'files', 'incoming'))).toEqual([])
  })

  it('is refused where it is too large, of another shape, or says where it was taken', async () => {
    const id = newId()
    await send(await picture(2400, 1200), id)
    expect((await sendCopy(id, await picture(2400, 1200))).status).toBe(413)
    expect((await sendCopy(id, await picture(900, 900))).status).toBe(422)
    expect((await sendCopy(id, withCameraNotes(await picture(2000, 1000), 1))).status).toBe(415)
    expect((await sendCopy(id, await picture(1000, 2000))).status).toBe(200)
  })
})

describe('a reading measured on a photo', () => {
  it('keeps its lines, computes percent from them, and takes no photo of another jar', async () => {
    const jars = await askedJars(t.db, study.studyId)
    const [jar, other] = [jarAt(jars, 25, 1, 'watch'), jarAt(jars, 45, 1, 'watch')]
    const id = newId()
    await send(await picture(60, 80), id)
    const lines = { fillTop: 100, topEdge: 130, bottomEdge: 400, base: 400 }
    const onPhoto = {
      photoId: id,
      width: 600,
      height: 800,
      lines,
      axisX: 300,
      tiltDegrees: 0,
      proposal: null,
    }
    const bodyFor = (asked: AskedJar, photoId: string, topMm = 6) => {
      const body = layered(study, asked, topMm, 0)
      const [reading] = body.readings
      const photoLines = { ...onPhoto, photoId }
      return {
        ...body,
        leaveOut: ['mass', 'look'],
        readings: [{ ...reading!, detail: { ...reading!.detail, photoLines } }],
      }
    }
    const keep = (asked: AskedJar, body: unknown) =>
      call(log, { cookie: technician.cookie, params: { id: asked.pullJarId }, body })
    const refused = await keep(other, bodyFor(other, id))
    expect(refused.status).toBe(422)
    expect(refused.body.error.sentence).toMatch(/another jar/)
    expect((await keep(jar, bodyFor(jar, id, 9))).body.error.sentence).toMatch(/do not say the same/)
    const kept = await keep(jar, bodyFor(jar, id))
    expect(kept.body.error).toBeUndefined()
    const row = await t.db
      .selectFrom('reading')
      .select(['value', 'detail'])
      .where('pullJarId', '=', jar.pullJarId)
      .where('attribute', '=', 'separation')
      .executeTakeFirstOrThrow()
    expect(row.value).toBe(10)
    expect(row.detail).toMatchObject({ photoLines: { photoId: id, lines } })
  })
})

describe('the photo that a jar is looked at beside', () => {
  const startOf = async (jar: AskedJar) => {
    const known: BenchDays = (await call(days, { cookie: technician.cookie })).body
    return known.jars.find((one) => one.pullJarId === jar.pullJarId)!.startPhoto
  }
  const photographed = async (asked: AskedJar, shows: string) => {
    const id = newId()
    const data = form(await picture(12, 16), id)
    data.set('pullJarId', asked.pullJarId)
    data.set('shows', shows)
    expect((await call(add, { cookie: technician.cookie, body: data })).status).toBe(200)
    return id
  }
  const batchSeen = (batchId: string, takenAt: string) =>
    transact(t.db, formulator.actor, {}, async (trx) => {
      const id = newId()
      const file = { sha256: 'a'.repeat(64), bytes: 9, type: 'image/jpeg', width: 3, height: 4 }
      await trx
        .insertInto('batchPhoto')
        .values({ id, batchId, ...file, takenBy: formulator.actor.personId, takenAt })
        .execute()
      return id
    })

  it("is the jar's own of its first pull, else its batch's from before the start, else none", async () => {
    const { studyId, batchId, startedAt } = await benchStudy(t.db, formulator.actor, 2)
    const asked = await askedJars(t.db, studyId)
    const [first, next] = [jarAt(asked, 45, 1, 'watch'), jarAt(asked, 45, 2, 'watch')]
    const [opened, other] = [jarAt(asked, 45, 2), jarAt(asked, 25, 2, 'watch')]
    expect(next.code, 'one jar, seen again').toBe(first.code)

    // Weeks later is not as at the start, and a patch beside a grey card shows no jar.
    await batchSeen(batchId, new Date(Date.parse(startedAt) + 9 * 86_400_000).toISOString())
    await photographed(first, 'colour')
    for (const jar of [first, next, opened, other]) expect(await startOf(jar)).toBeNull()

    const ofBatch = await batchSeen(batchId, new Date(Date.parse(startedAt) - 86_400_000).toISOString())
    const ofJar = await photographed(first, 'jar')
    expect(await startOf(next)).toMatchObject({ of: 'jar', id: ofJar, label: 'week 1' })
    for (const jar of [first, opened, other])
      expect(await startOf(jar)).toMatchObject({ of: 'batch', id: ofBatch, label: null })
  })
})

describe('A08: what is no photo is refused and leaves nothing', () => {
  const svg = new TextEncoder().encode(
    '<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>',
  )
  const heic = new Uint8Array(
    Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic'), Buffer.alloc(60)]),
  )
  let sound: Buffer
  beforeAll(async () => {
    sound = Buffer.from(await picture(64, 48))
  })
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
    [
      'a JPEG with a web page behind it',
      () => new Uint8Array(Buffer.concat([sound, Buffer.from('<HTML><script>alert(1)</script>')])),
      415,
      /another kind/,
    ],
    [
      'a JPEG that is an archive as well',
      () => new Uint8Array(Buffer.concat([sound, Buffer.from('PK\u0003\u0004'), Buffer.alloc(90)])),
      415,
      /another kind/,
    ],
    ['a JPEG cut short', () => new Uint8Array(sound.subarray(0, sound.length - 40)), 415, /breaks off/],
    ['an empty file', () => new Uint8Array(), 422, /empty/],
    ['26 MB', () => new Uint8Array(26 * 1024 * 1024), 413, /larger than/],
  ])('%s', async (_name, bytes, status, sentence) => {
    const before = await count()
    const answer = await send(bytes())
    expect(answer.body.error.sentence).toMatch(sentence)
    expect(answer.status).toBe(status)
    expect(await count()).toBe(before)
  })

  it('takes at most 150 MB more memory for 24 MB, and leaves nothing behind', async () => {
    const before = process.memoryUsage.rss()
    const tail = Buffer.alloc(24_000_000, 1)
    const { status } = await send(new Uint8Array(Buffer.concat([sound.subarray(0, 200), tail])))
    expect(status).toBe(415)
    expect((process.memoryUsage.rss() - before) / 1e6).toBeLessThan(150)
    expect(await readdir(path.join(folder, 'files', 'incoming'))).toEqual([])
  })

  it.each(['../x', '../../etc/passwd', '/etc/passwd', 'week 4/jar.jpg'])(
    'the name %s, which is a path, is refused and leaves nothing',
    async (name) => {
      const before = await count()
      const answer = await send(await picture(8, 8), newId(), name)
      expect(answer.status).toBe(422)
      expect(answer.body.error.sentence).toMatch(/is a path and not a file's name/)
      expect(await count()).toBe(before)
      expect(await readdir(path.join(folder, 'files', 'incoming'))).toEqual([])
    },
  )

  it('a name with dots and letters of any script is kept as it is', async () => {
    const id = newId()
    expect((await send(await picture(8, 8), id, 'jar..week 4, 45 °C.jpg')).status).toBe(200)
    const { originalName } = await t.db
      .selectFrom('photo')
      .select('originalName')
      .where('id', '=', id)
      .executeTakeFirstOrThrow()
    expect(originalName).toBe('jar..week 4, 45 °C.jpg')
  })
})
