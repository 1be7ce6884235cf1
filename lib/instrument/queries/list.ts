import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, type Source } from '@/lib/list/queries/source'
import type { DailyCheck } from '../schema'
import type { ListQuery } from '@/lib/list/schema'

export type Spindle = { name: string; constant: number }
export type CheckDetail = { sentence: string; read: number; expected: number; unit: string }
export type CalibrationDetail = { sentence?: string; efficiencyPercent?: number; slopeMvPerPh?: number }

const shownChecks = 60

const columns = [
  'instrument.id',
  'instrument.code',
  'instrument.kind',
  'instrument.name',
  'instrument.isActive',
  'instrument.version',
] as const

/** Instruments with their newest calibration, those in use first. */
export async function listInstruments(db: Db, _actor: Actor) {
  return db
    .selectFrom('instrument')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('calibration')
          .select(['calibration.dueOn', 'calibration.result', 'calibration.calibratedAt'])
          .select((detail) =>
            detail.ref('calibration.detail').$castTo<CalibrationDetail | null>().as('detail'),
          )
          .whereRef('calibration.instrumentId', '=', 'instrument.id')
          .orderBy('calibration.calibratedAt', 'desc')
          .orderBy('calibration.id', 'desc')
          .limit(1)
          .as('newest'),
      (join) => join.onTrue(),
    )
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('instrumentCheck as own')
          .innerJoin('person', 'person.id', 'own.recordedBy')
          .select(['own.result as checkResult', 'own.checkedAt', 'person.initials as checkedBy'])
          .select((detail) => detail.ref('own.detail').$castTo<CheckDetail | null>().as('checkDetail'))
          .whereRef('own.instrumentId', '=', 'instrument.id')
          .orderBy('own.checkedAt', 'desc')
          .orderBy('own.id', 'desc')
          .limit(1)
          .as('checked'),
      (join) => join.onTrue(),
    )
    .select(columns)
    .select((eb) => [
      eb.ref('instrument.spindles').$castTo<Spindle[]>().as('spindles'),
      eb.ref('instrument.dailyCheck').$castTo<DailyCheck | null>().as('dailyCheck'),
    ])
    .select(['newest.dueOn', 'newest.result', 'newest.calibratedAt', 'newest.detail'])
    .select(['checked.checkResult', 'checked.checkedAt', 'checked.checkedBy', 'checked.checkDetail'])
    .orderBy('instrument.isActive', 'desc')
    .orderBy('instrument.kind')
    .orderBy(sql`instrument.code collate natural_order`)
    .execute()
}
export type InstrumentRow = Awaited<ReturnType<typeof listInstruments>>[number]

type Query = ListQuery<'kind' | 'result' | 'use'>

/** A lab's instruments are few enough for the rows of a page to be picked from all of them. */
export function instrumentSource(db: Db, actor: Actor, { q, filters }: Query): Source<InstrumentRow> {
  const { kind, result, use } = filters
  const typed = likeTyped(q)
  return {
    from: sql`instrument left join lateral (
        select due_on, result, calibrated_at from calibration where instrument_id = instrument.id
        order by calibrated_at desc, id desc limit 1) newest on true`,
    where: [
      ...(q
        ? [
            sql<SqlBool>`(instrument.code ilike ${typed} or instrument.name ilike ${typed} or instrument.kind ilike ${typed})`,
          ]
        : []),
      ...(kind ? [sql<SqlBool>`instrument.kind = ${kind}`] : []),
      ...(result ? [sql<SqlBool>`coalesce(newest.result, 'none yet') = ${result}`] : []),
      ...(use ? [sql<SqlBool>`instrument.is_active = ${use === 'in use'}`] : []),
    ],
    id: sql`instrument.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('instrument.code'),
      name: naturally('instrument.name'),
      kind: { by: sql`instrument.kind`, kind: 'text' },
      result: { by: sql`newest.result`, kind: 'text' },
      due: { by: sql`newest.due_on`, kind: 'day' },
      calibrated: { by: sql`newest.calibrated_at`, kind: 'instant' },
    },
    rows: async (ids) => (await listInstruments(db, actor)).filter((row) => ids.includes(row.id)),
    idOf: (row) => row.id,
  }
}

export async function listInstrumentPage(db: Db, actor: Actor, query: Query) {
  return pageOf(db, instrumentSource(db, actor, query), query)
}
export type InstrumentsPage = Awaited<ReturnType<typeof listInstrumentPage>>

export async function getInstrument(db: Db, _actor: Actor, id: string) {
  const instrument = await db
    .selectFrom('instrument')
    .select(columns)
    .select((eb) => [
      eb.ref('instrument.spindles').$castTo<Spindle[]>().as('spindles'),
      eb.ref('instrument.dailyCheck').$castTo<DailyCheck | null>().as('dailyCheck'),
    ])
    .where('id', '=', id)
    .executeTakeFirst()
  if (!instrument) throw refuse.notFound()
  const calibrations = await db
    .selectFrom('calibration')
    .innerJoin('person', 'person.id', 'calibration.recordedBy')
    .select(['calibration.id', 'calibration.calibratedAt', 'calibration.dueOn', 'calibration.result'])
    .select(['calibration.note', 'calibration.recordedAt', 'person.initials'])
    .select((eb) => eb.ref('calibration.detail').$castTo<CalibrationDetail>().as('detail'))
    .where('calibration.instrumentId', '=', id)
    .orderBy('calibration.calibratedAt', 'desc')
    .orderBy('calibration.id', 'desc')
    .execute()
  const checks = await db
    .selectFrom('instrumentCheck as own')
    .innerJoin('person', 'person.id', 'own.recordedBy')
    .leftJoin('lot', 'lot.id', 'own.lotId')
    .select(['own.id', 'own.checkedAt', 'own.result', 'own.note', 'person.initials', 'lot.lot'])
    .select((eb) => eb.ref('own.detail').$castTo<CheckDetail>().as('detail'))
    .where('own.instrumentId', '=', id)
    .orderBy('own.checkedAt', 'desc')
    .orderBy('own.id', 'desc')
    .limit(shownChecks)
    .execute()
  return { ...instrument, calibrations, checks }
}
export type InstrumentPage = Awaited<ReturnType<typeof getInstrument>>
