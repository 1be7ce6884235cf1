import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as MAKE } from '@/app/api/batches/route'
import { GET as COMPARE } from '@/app/api/formulas/compare/route'
import { GET as LIST, POST as CREATE } from '@/app/api/formulas/route'
import { GET, PUT } from '@/app/api/formulas/[code]/route'
import { GET as DIFFERENCE } from '@/app/api/formulas/[code]/difference/route'
import { POST as VARY } from '@/app/api/formulas/[code]/variants/route'
import { POST as NEW_VERSION } from '@/app/api/formulas/[code]/versions/route'
import { newId } from '@/lib/db/id'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { countStatements } from '../support/statements'

let t: TestDatabase
let lena: Signed
let technician: Signed

beforeAll(async () => {
  t = await testDatabase()
  lena = await t.person('formulator', { name: 'Lena Brandt' })
  technician = await t.person('technician')
})
afterAll(() => t.close())

const line = (phase: string, inciName: string, percent: number, more: object = {}) => ({
  ...{ id: newId(), phase, inciName, function: '', density: 1, isInternal: phase === 'B' },
  percentThousandths: Math.round(percent * 1000),
  ...more,
})
const step = (instruction: string, more: object = {}) => ({ id: newId(), instruction, ...more })

async function newFormula(code: string, lines: ReturnType<typeof line>[], steps: object[] = []) {
  const body = {
    ...{ id: newId(), versionId: newId(), code, name: `Cream ${code}`, emulsionType: 'water-in-oil' },
    ...{ lines, steps },
  }
  const answer = await call(CREATE, { cookie: lena.cookie, body })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return body
}

/** Gum and salt in the water, which fills up. */
const baseLines = () => [
  line('A', 'Squalane', 14, { priceCentsPerKg: 2000 }),
  line('B', 'Xanthan Gum', 0.2),
  line('B', 'Magnesium Sulfate', 0.7),
  line('B', 'Aqua', 85.1, { isRemainder: true }),
]
const member = (code: string, ...shares: number[]) => ({
  ...{ id: newId(), versionId: newId(), code, name: `Variant ${code}`, shares },
})
const vary = (code: string, body: unknown, who = lena) =>
  call(VARY, { cookie: who.cookie, params: { code }, body })
const load = async (code: string, query: Record<string, string> = {}) =>
  (await call(GET, { cookie: lena.cookie, params: { code }, query })).body
const countFormulas = async () => (await t.owner.selectFrom('formula').select('id').execute()).length

describe('a family of variants', () => {
  it('is made of one base: each a formula with a draft that says where it came from, balanced to 100', async () => {
    const lines = baseLines()
    const joining = { phase: 'B into A', minutes: 40, lookFor: 'Streaks that close.', caution: 'No sleeves.' }
    const base = await newFormula('V1', lines, [step('B into A', joining)])
    const [gum, salt] = [lines[1]!.id, lines[2]!.id]
    const members = ['a', 'b', 'c', 'd', 'e', 'f'].map((tail, index) =>
      member(`V1${tail}`, 200 + 100 * (index % 3), index < 3 ? 500 : 900),
    )
    const made = await vary('V1', { fromVersionId: base.versionId, lineIds: [gum, salt], members })
    expect(made.status, JSON.stringify(made.body)).toBe(200)
    expect(made.body.map((one: { code: string }) => one.code)).toEqual(members.map((one) => one.code))
    const last = await load('V1f')
    expect([last.state, last.number, last.versionId]).toEqual(['draft', 1, members[5]!.versionId])
    expect(last.emulsionType).toBe('water-in-oil')
    expect(last.note).toBe('From V1, version 1: Xanthan Gum 0.40 %, Magnesium Sulfate 0.90 %.')
    const shares = Object.fromEntries(
      last.lines.map((row: { inciName: string; percentThousandths: number }) => [
        row.inciName,
        row.percentThousandths,
      ]),
    )
    // 100 − 14 − 0.4 − 0.9
    expect(shares).toEqual({
      ...{ Squalane: 14_000, 'Xanthan Gum': 400, 'Magnesium Sulfate': 900, Aqua: 84_700 },
    })
    expect(last.steps).toMatchObject([{ instruction: 'B into A', ...joining }])
    expect(last.families).toHaveLength(1)
    expect(last.families[0].base).toEqual({ code: 'V1', number: 1 })
    expect(last.families[0].members).toHaveLength(6)
    expect((await load('V1')).families[0].members[5]).toEqual({
      code: 'V1f',
      levels: [
        { phase: 'B', inciName: 'Xanthan Gum', percentThousandths: 400 },
        { phase: 'B', inciName: 'Magnesium Sulfate', percentThousandths: 900 },
      ],
    })
  })

  it('D05: sent twice it is there once, also under another key', async () => {
    const lines = baseLines()
    const base = await newFormula('V2', lines)
    const body = {
      ...{ fromVersionId: base.versionId, lineIds: [lines[1]!.id] },
      members: [member('V2a', 300), member('V2b', 400)],
    }
    const first = await vary('V2', body)
    const count = await countFormulas()
    const again = await vary('V2', body)
    expect(again.status).toBe(200)
    expect(again.body).toEqual(first.body)
    expect(await countFormulas()).toBe(count)
  })

  it('R01: leaves one trail row per row made, by who made it', async () => {
    const lines = baseLines()
    const base = await newFormula('V3', lines)
    const made = await vary('V3', {
      ...{ fromVersionId: base.versionId, lineIds: [lines[1]!.id] },
      members: [member('V3a', 300)],
    })
    const trail = await t.owner
      .selectFrom('trail')
      .select(['tableName', 'operation', 'actorId'])
      .where('requestId', '=', made.headers.get('x-request-id'))
      .execute()
    expect(trail.map((row) => `${row.operation} ${row.tableName}`).sort()).toEqual([
      'insert formula',
      ...Array.from({ length: 4 }, () => 'insert formula_line'),
      'insert formula_version',
    ])
    expect(new Set(trail.map((row) => row.actorId))).toEqual(new Set([lena.actor.personId]))
  })

  it('takes the same number of statements for one as for twelve', async () => {
    const lines = baseLines()
    const base = await newFormula('V4', lines, [step('Stir')])
    const lineIds = [lines[1]!.id]
    const make = (members: object[]) => vary('V4', { fromVersionId: base.versionId, lineIds, members })
    const one = await countStatements(() => make([member('V4z', 999)]))
    const many = await countStatements(() =>
      make([...'abcdefghijkl'].map((tail, index) => member(`V4${tail}`, 10 * index))),
    )
    expect(many.count).toBe(one.count)
    expect(many.count).toBeLessThanOrEqual(15)
    expect((await load('V4l')).lines).toHaveLength(4)
  })
})

describe('a family is refused', () => {
  let base: Awaited<ReturnType<typeof newFormula>>
  let lines: ReturnType<typeof line>[]
  beforeAll(async () => {
    lines = baseLines()
    base = await newFormula('V9', lines)
  })
  const body = (more: object = {}) => ({
    ...{ fromVersionId: base.versionId, lineIds: [lines[1]!.id] },
    members: [member('V9a', 300)],
    ...more,
  })
  async function refused(sent: object, code = 'V9', who = lena) {
    const count = await countFormulas()
    const answer = await vary(code, sent, who)
    expect(await countFormulas()).toBe(count)
    return answer
  }

  it('where the q.s. line would go below 0, with the member named, and nothing is made', async () => {
    const answer = await refused(body({ members: [member('V9a', 300), member('V9b', 86_000)] }))
    expect(answer.status).toBe(422)
    // 100 − 14 − 0.7 − 86
    expect(answer.body.error.sentence).toContain('V9b does not fit')
    expect(answer.body.error.sentence).toContain('0.70 % below 0')
    expect(Object.keys(answer.body.error.fields)).toEqual(['members.1.shares'])
  })

  it('where no line is q.s. to 100', async () => {
    const own = [line('A', 'Squalane', 14), line('B', 'Aqua', 86)]
    const made = await newFormula('V8', own)
    const sent = body({ fromVersionId: made.versionId, lineIds: [own[0]!.id] })
    const answer = await refused(sent, 'V8')
    expect(answer.status).toBe(422)
    expect(answer.body.error.sentence).toContain('Version 1 of V8 has no q.s. to 100 line')
  })

  it('where the q.s. line itself, a strange line, the same line twice or three lines are varied', async () => {
    const own = await refused(body({ lineIds: [lines[3]!.id] }))
    expect(own.status).toBe(422)
    expect(own.body.error.sentence).toContain('Aqua is the q.s. to 100 line')
    expect((await refused(body({ lineIds: [newId()] }))).status).toBe(422)
    const id = lines[1]!.id
    const twice = await refused(body({ lineIds: [id, id], members: [member('V9a', 1, 2)] }))
    expect(twice.body.error.fields.lineIds).toContain('same line')
    const three = await refused(body({ lineIds: lines.slice(0, 3).map((one) => one.id) }))
    expect(three.body.error.fields.lineIds).toContain('one or two')
  })

  it('where a code is taken, stands twice or has other signs', async () => {
    const taken = await refused(body({ members: [member('v9', 300), member('V9b', 400)] }))
    expect(taken.status).toBe(409)
    expect(taken.body.error.sentence).toContain('V9 is a formula already')
    expect(taken.body.error.detail.fields).toEqual({ 'members.0.code': 'V9 belongs to Cream V9.' })
    const twice = await refused(body({ members: [member('V9a', 300), member('v9A', 400)] }))
    expect(twice.status).toBe(422)
    expect(twice.body.error.fields['members.1.code']).toContain('stands twice')
    const odd = await refused(body({ members: [member('V9-a', 300)] }))
    expect(odd.body.error.fields['members.0.code']).toContain('letters and digits')
    for (const code of ['new', 'Compare'])
      expect(
        (await refused(body({ members: [member(code, 300)] }))).body.error.fields['members.0.code'],
      ).toContain('pages of the list')
  })

  it('where there are none, more than twelve, the same levels twice or a level too few', async () => {
    expect((await refused(body({ members: [] }))).body.error.fields.members).toContain('Give the levels')
    const many = Array.from({ length: 13 }, (_, index) => member(`V9x${index}`, index))
    expect((await refused(body({ members: many }))).body.error.fields.members).toContain('at most 12')
    const same = await refused(body({ members: [member('V9a', 300), member('V9b', 300)] }))
    expect(same.body.error.fields['members.1.shares']).toContain('levels of another')
    const few = await refused(body({ lineIds: [lines[1]!.id, lines[2]!.id] }))
    expect(few.body.error.fields['members.0.shares']).toContain('one share for each')
    const absurd = await refused(
      body({ members: [member('V9a', -1), member('V9b', 100_001), member('V9c', 0.5)] }),
    )
    expect(absurd.status).toBe(422)
  })

  it('where the version is another formula’s, or not there', async () => {
    expect((await refused(body(), 'V1')).status).toBe(404)
    expect((await refused(body(), 'V99')).status).toBe(404)
    expect((await refused(body({ fromVersionId: newId() }))).status).toBe(404)
  })

  it('for a technician', async () => {
    expect((await refused(body(), 'V9', technician)).status).toBe(403)
  })
})

describe('a long formula', () => {
  it('of 60 lines saves in at most 25 statements, and one of 200 in as many', async () => {
    const counts: number[] = []
    for (const count of [60, 200]) {
      const code = `LONG${count}`
      const rows = Array.from({ length: count }, (_, index) => line('A', `Oil ${index}`, 0.5))
      const made = await newFormula(code, rows, [step('Stir')])
      const body = {
        ...{ versionId: made.versionId, version: 1, name: 'Long', emulsionType: 'water-in-oil', note: 'x' },
        lines: rows.toReversed().map((row) => ({ ...row, percentThousandths: 400 })),
        steps: [step('Stir again'), step('Fill')],
      }
      let status = 0
      const { count: statements } = await countStatements(async () => {
        status = (await call(PUT, { cookie: lena.cookie, method: 'PUT', params: { code }, body })).status
      })
      expect(status).toBe(200)
      expect((await load(code)).lines).toHaveLength(count)
      counts.push(statements)
    }
    expect(counts[0]).toBeLessThanOrEqual(25)
    expect(counts[1]).toBe(counts[0])
  })

  it('has at most 200 lines', async () => {
    const lines = Array.from({ length: 201 }, (_, index) => line('A', `Oil ${index}`, 0.1))
    const answer = await call(CREATE, {
      cookie: lena.cookie,
      body: { id: newId(), versionId: newId(), code: 'L201', name: 'x', emulsionType: 'water-in-oil', lines },
    })
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields.lines).toBe('A formula has at most 200 lines.')
  })
})

describe('the difference of two versions', () => {
  const differ = (code: string, query: Record<string, string> = {}) =>
    call(DIFFERENCE, { cookie: technician.cookie, params: { code }, query })

  beforeAll(async () => {
    const made = await newFormula('D1', [
      line('A', 'Squalane', 14),
      line('B', 'Aqua', 86, { isRemainder: true }),
    ])
    const batch = { id: newId(), formulaVersionId: made.versionId, sizeG: 1000 }
    expect((await call(MAKE, { cookie: lena.cookie, body: batch })).status).toBe(200)
    const next = { id: newId(), fromVersionId: made.versionId, note: 'More oil' }
    await call(NEW_VERSION, { cookie: lena.cookie, params: { code: 'D1' }, body: next })
    const page = await load('D1')
    const lines = page.lines.map(({ formulaVersionId: _, ...row }: { formulaVersionId: string }) => row)
    const body = {
      ...{
        versionId: page.versionId,
        version: 1,
        name: page.name,
        emulsionType: page.emulsionType,
        note: '',
      },
      lines: [
        { ...lines[0], percentThousandths: 15_000 },
        { ...lines[1], percentThousandths: 84_000 },
        line('B', 'Glycerin', 1),
      ],
      steps: [],
    }
    const saved = await call(PUT, { cookie: lena.cookie, method: 'PUT', params: { code: 'D1' }, body })
    expect(saved.status, JSON.stringify(saved.body)).toBe(200)
  })

  it('is of the latest against the one before, of any two, and of two formulas', async () => {
    const latest = (await differ('D1')).body
    expect([latest.from.number, latest.to.number]).toEqual([1, 2])
    expect(latest.difference.counts).toEqual({ added: 1, removed: 0, changed: 2 })
    expect([latest.difference.from.internalMassPercent, latest.difference.to.internalMassPercent]).toEqual([
      86, 85,
    ])
    const back = (await differ('D1', { from: '2', to: '1' })).body
    expect(back.difference.counts).toEqual({ added: 0, removed: 1, changed: 2 })
    const other = (await differ('D1', { from: '1', with: 'V1' })).body
    expect([other.to.code, other.to.number]).toEqual(['V1', 1])
    expect(other.difference.counts.added).toBe(3)
    expect((await differ('D1', { from: '1', to: '1' })).body.difference.counts.changed).toBe(0)
  })

  it('takes three statements', async () => {
    expect((await countStatements(() => differ('D1'))).count).toBe(3)
  })

  it('is not there for a formula or version that is not, and bad addresses are no fault', async () => {
    for (const query of [{ from: '9' }, { to: '9' }, { with: 'NOPE' }] as Record<string, string>[])
      expect((await differ('D1', query)).status).toBe(404)
    expect((await differ('NOPE')).status).toBe(404)
    expect((await differ('D1', { from: 'x', to: '-1', with: '' })).status).toBe(200)
  })
})

describe('the comparison', () => {
  const compare = (codes: string) =>
    call(COMPARE, { cookie: technician.cookie, path: `/api/formulas/compare?${codes}` })

  it('is of the formulas picked, in their order, and names what is not there', async () => {
    const answer = await compare('code=V1b&code=D1&code=NOPE')
    expect(answer.status, JSON.stringify(answer.body)).toBe(200)
    expect(answer.body.formulas.map((one: { code: string }) => one.code)).toEqual(['V1b', 'D1'])
    expect(answer.body.formulas[0].levels[0]).toMatchObject({ inciName: 'Xanthan Gum' })
    expect(answer.body.missing).toEqual(['NOPE'])
    expect(answer.body.finding.strong).toBe('Too early')
    expect((await compare('')).body.finding.strong).toBe('Nothing')
  })

  it('refuses more than twelve with a sentence', async () => {
    const codes = Array.from({ length: 13 }, (_, index) => `code=X${index}`).join('&')
    const answer = await compare(codes)
    expect(answer.status).toBe(422)
    expect(answer.body.error.sentence).toContain('13 formulas')
  })

  it('takes at most eight statements for twelve', async () => {
    const all = await call(LIST, { cookie: lena.cookie })
    const codes = all.body.rows.slice(0, 12).map((row: { code: string }) => `code=${row.code}`)
    expect(codes).toHaveLength(12)
    const { count } = await countStatements(() => compare(codes.join('&')))
    expect(count).toBeLessThanOrEqual(8)
  })
})
