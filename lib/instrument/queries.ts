import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'

export type Spindle = { name: string; constant: number }
export type CalibrationDetail = { sentence?: string; efficiencyPercent?: number; slopeMvPerPh?: number }

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
    .select(columns)
    .select((eb) => eb.ref('instrument.spindles').$castTo<Spindle[]>().as('spindles'))
    .select(['newest.dueOn', 'newest.result', 'newest.calibratedAt', 'newest.detail'])
    .orderBy('instrument.isActive', 'desc')
    .orderBy('instrument.kind')
    .orderBy('instrument.code')
    .execute()
}
export type InstrumentRow = Awaited<ReturnType<typeof listInstruments>>[number]

export async function getInstrument(db: Db, _actor: Actor, id: string) {
  const instrument = await db
    .selectFrom('instrument')
    .select(columns)
    .select((eb) => eb.ref('instrument.spindles').$castTo<Spindle[]>().as('spindles'))
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
  return { ...instrument, calibrations }
}
export type InstrumentPage = Awaited<ReturnType<typeof getInstrument>>
