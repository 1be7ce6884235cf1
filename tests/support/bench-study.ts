import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { startStudy } from '@/lib/study/commands/start-study'
import { startedStudy } from '@/lib/study/schema'

export const stationsOfTest = [
  { name: 'Fridge 1', temperatureC: 5 },
  { name: 'Cabinet 2', temperatureC: 25 },
  { name: 'Oven 3', temperatureC: 45 },
] as const

const weeks = [1, 2, 3, 4, 6, 8, 10, 12]

export const planOfTest: ProtocolPlan = {
  endWeeks: 12,
  fillG: 50,
  fillHeightMm: 60,
  lossPercent: 2,
  restHours: 24,
  retains: 1,
  initialJars: 1,
  pack: 'glass jar',
  stations: stationsOfTest.map(({ temperatureC }) => ({
    kind: 'temperature' as const,
    temperatureC,
    voice: temperatureC === 45 ? ('decides' as const) : ('informs' as const),
    timePoints: weeks,
    windowDays: 2,
    watchJars: 1,
    measuringJarsPerPull: 1,
    spares: 2,
  })),
  attributes: [
    { attribute: 'separation', tolerance: { kind: 'range', upper: 2 }, replicates: 1, method: 'ruler' },
    {
      attribute: 'ph',
      tolerance: { kind: 'shift', below: 0.5, above: 0.5 },
      replicates: 1,
      method: '',
      conditions: { phMethod: 'direct' },
    },
    {
      attribute: 'viscosity',
      tolerance: { kind: 'percent', below: 20, above: 20 },
      replicates: 1,
      method: '',
      conditions: { seconds: 30, path: 'fixed' },
      viscosity: { spindle: 'disc 4', spindleConstant: 2000, rpm: 20 },
    },
  ],
}

export type BenchStudy = {
  studyId: string
  code: string
  batchId: string
  meterId: string
  viscometerId: string
  startedAt: string
  stationIds: Record<number, string>
}

/** A study that began `weeksAgo`: one lotion at 5, 25 and 45 °C, with initial pH 5.50 and viscosity 6 500 mPa·s. */
export async function benchStudy(
  db: Db,
  formulator: Actor,
  weeksAgo: number,
  plan = planOfTest,
  initials: { attribute: string; typed: string[] }[] = [],
): Promise<BenchStudy> {
  const startedAt = new Date(Date.now() - weeksAgo * 604_800_000 - 3_600_000).toISOString()
  return transact(db, formulator, {}, async (trx) => {
    const mark = newId().slice(-6)
    const batchId = await insertBatch(trx, formulator, mark, startedAt)
    const protocolVersionId = await insertProtocol(trx, formulator, mark, plan)
    const stationIds = await insertStations(trx, mark)
    const { meterId, viscometerId } = await insertInstruments(trx, formulator, mark)
    const studyId = newId()
    const { code } = await startStudy(
      trx,
      formulator,
      startedStudy.parse({
        id: studyId,
        title: 'Lotion of the tests',
        protocolVersionId,
        batchIds: [batchId],
        stationChoices: stationsOfTest.map(({ temperatureC }, position) => ({
          position,
          stationId: stationIds[temperatureC],
        })),
        startedAt,
        initialReadings: [
          { batchId, attribute: 'ph', typed: ['5.50'] },
          {
            batchId,
            attribute: 'viscosity',
            typed: ['6500'],
          },
          ...initials.map((one) => ({ batchId, ...one })),
        ],
      }),
    )
    return { studyId, code, batchId, meterId, viscometerId, startedAt, stationIds }
  })
}

async function insertBatch(trx: Trx, actor: Actor, mark: string, madeAt: string): Promise<string> {
  const [formulaId, versionId, batchId] = [newId(), newId(), newId()]
  await trx
    .insertInto('formula')
    .values({
      id: formulaId,
      code: `L-${mark}`,
      name: 'Oat lotion',
      emulsionType: 'oil-in-water',
      createdBy: actor.personId,
    })
    .execute()
  await trx
    .insertInto('formulaVersion')
    .values({ id: versionId, formulaId, number: 1, state: 'locked', createdBy: actor.personId })
    .execute()
  await trx
    .insertInto('formulaLine')
    .values([
      {
        id: newId(),
        formulaVersionId: versionId,
        position: 1,
        phase: 'A',
        inciName: 'Aqua',
        percentThousandths: 80_000,
        density: 1,
        isInternal: false,
      },
      {
        id: newId(),
        formulaVersionId: versionId,
        position: 2,
        phase: 'B',
        inciName: 'Squalane',
        percentThousandths: 20_000,
        density: 0.81,
        isInternal: true,
      },
    ])
    .execute()
  await trx
    .insertInto('batch')
    .values({
      id: batchId,
      code: `B-${mark}`,
      formulaVersionId: versionId,
      sizeG: 10_000,
      yieldG: 9_000,
      state: 'released',
      madeAt: new Date(Date.parse(madeAt) - 86_400_000).toISOString(),
      emulsionTypeMethod: 'dilution',
      emulsionTypeFound: 'oil-in-water',
      createdBy: actor.personId,
    })
    .execute()
  return batchId
}

async function insertProtocol(trx: Trx, actor: Actor, mark: string, plan: ProtocolPlan): Promise<string> {
  const [protocolId, id] = [newId(), newId()]
  await trx
    .insertInto('protocol')
    .values({ id: protocolId, code: `P-${mark}`, name: 'Twelve weeks', createdBy: actor.personId })
    .execute()
  await trx
    .insertInto('protocolVersion')
    .values({
      id,
      protocolId,
      number: 1,
      state: 'locked',
      plan: JSON.stringify(plan),
      createdBy: actor.personId,
    })
    .execute()
  return id
}

async function insertStations(trx: Trx, mark: string): Promise<Record<number, string>> {
  const rows = stationsOfTest.map(({ name, temperatureC }, index) => ({
    id: newId(),
    name: `${name} ${mark}`,
    kind: 'temperature',
    temperatureC,
    lowC: temperatureC - 2,
    highC: temperatureC + 2,
    walkOrder: index + 1,
    shelves: 10,
    placesPerShelf: 100,
    caution: temperatureC === 45 ? 'Hot glass: gloves, eye protection.' : '',
  }))
  await trx.insertInto('station').values(rows).execute()
  return Object.fromEntries(rows.map((row) => [row.temperatureC, row.id]))
}

async function insertInstruments(trx: Trx, actor: Actor, mark: string) {
  const [meterId, viscometerId] = [newId(), newId()]
  await trx
    .insertInto('instrument')
    .values([
      { id: meterId, code: `M-${mark}`, kind: 'meter', name: 'Bench meter' },
      {
        id: viscometerId,
        code: `V-${mark}`,
        kind: 'viscometer',
        name: 'Bench viscometer',
        spindles: JSON.stringify([{ name: 'disc 5', constant: 4000 }]),
      },
    ])
    .execute()
  await trx
    .insertInto('calibration')
    .values(
      [meterId, viscometerId].map((instrumentId) => ({
        id: newId(),
        instrumentId,
        calibratedAt: new Date(Date.now() - 86_400_000).toISOString(),
        dueOn: '2099-01-01',
        result: 'good',
        recordedBy: actor.personId,
      })),
    )
    .execute()
  return { meterId, viscometerId }
}

export type AskedJar = {
  pullJarId: string
  version: number
  code: string
  asks: string
  timeWeeks: number
  temperatureC: number
}

/** What is asked of the study's jars, in time order, the coldest station first. */
export async function askedJars(db: Db, studyId: string): Promise<AskedJar[]> {
  const rows = await db
    .selectFrom('pullJar as pj')
    .innerJoin('pull', 'pull.id', 'pj.pullId')
    .innerJoin('studyStation as ss', 'ss.id', 'pull.studyStationId')
    .innerJoin('jar', 'jar.id', 'pj.jarId')
    .select(['pj.id as pullJarId', 'pj.version', 'jar.code', 'pj.asks', 'pull.timeWeeks', 'ss.temperatureC'])
    .where('pj.studyId', '=', studyId)
    .orderBy('pull.timeWeeks')
    .orderBy('ss.temperatureC')
    .orderBy('jar.code')
    .execute()
  return rows.map((row) => ({ ...row, temperatureC: row.temperatureC! }))
}

export function jarAt(
  jars: AskedJar[],
  temperatureC: number,
  timeWeeks: number,
  asks = 'measuring',
): AskedJar {
  const jar = jars.find(
    (one) => one.temperatureC === temperatureC && one.timeWeeks === timeWeeks && one.asks === asks,
  )
  if (!jar) throw new Error(`No ${asks} jar at ${temperatureC} °C in week ${timeWeeks}`)
  return jar
}

type Values = { ph?: string | null; torque?: string | null; at?: string; more?: Record<string, unknown> }

/** The body of a measuring jar's readings; claimed at the jar's own time point, by a device whose clock is right. */
export function measured(
  study: BenchStudy,
  jar: AskedJar,
  { ph = '5.50', torque = '65', at, more }: Values = {},
) {
  const due = new Date(Date.parse(study.startedAt) + jar.timeWeeks * 604_800_000).toISOString()
  const readings = []
  if (ph !== null)
    readings.push({
      id: newId(),
      attribute: 'ph',
      typed: ph,
      instrumentId: study.meterId,
      isConfirmed: false,
    })
  if (torque !== null) {
    readings.push({
      id: newId(),
      attribute: 'viscosity',
      typed: torque,
      detail: { torquePercent: Number(torque.replace(',', '.')) },
      instrumentId: study.viscometerId,
      isConfirmed: false,
    })
  }
  return {
    version: jar.version,
    deviceNow: new Date().toISOString(),
    claimedAt: at ?? due,
    note: '',
    readings,
    ...more,
  }
}

/** The body of a watch jar's layers. */
export function layered(study: BenchStudy, jar: AskedJar, topMm: number, bottomMm: number) {
  return {
    ...measured(study, jar, { ph: null, torque: null }),
    readings: [
      {
        id: newId(),
        attribute: 'separation',
        typed: `${topMm} and ${bottomMm} of 60`,
        detail: { topMm, bottomMm, totalMm: 60 },
        isConfirmed: true,
      },
    ],
  }
}
