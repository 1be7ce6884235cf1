import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { keepFlags } from '@/lib/flag/commands/keep-flags'
import { wantedFlags } from '@/lib/flag/rules/wanted'
import { assignRepeats } from '@/lib/pull/commands/assign-repeats'
import { pulledFor } from '@/lib/protocol/rules/plan'
import type { SeriesFinding } from '@/lib/science/series'
import { loadFrame, type Frame } from './queries/frame'
import { assessStudy, type Assessed } from './rules/assess'

type Scope = {
  /** Attributes whose readings changed; all of the study's where left out. */
  only?: readonly string[]
  /** Already loaded, after the study was locked. */
  frame?: Frame
}

export type Recomputed = Awaited<ReturnType<typeof recomputeSeries>>

/**
 * Derives the study's series from its readings, raises and clears flags, gives spare jars to what wants a repeat,
 * and tells the followers. The caller has locked the study (lockStudy).
 */
export async function recomputeSeries(trx: Trx, actor: Actor, studyId: string, scope: Scope = {}) {
  const frame = scope.frame ?? (await loadFrame(trx, studyId))
  const only = scope.only ? new Set(scope.only) : null
  const { assessed, shifted } = assessStudy(frame, only)
  await upsertSeries(trx, frame, only, assessed)
  const { wanted, repeats } = await assignRepeats(trx, frame, wantedFlags(frame, assessed, shifted))
  const { raised, cleared } = await keepFlags(trx, actor, frame, wanted, only, frame.study.now)
  return {
    series: assessed.map(({ unit, finding }) => ({
      batchId: unit.batch.id,
      studyStationId: unit.station.id,
      attribute: unit.attribute,
      standing: finding.standing,
      used: finding.used,
      latest: finding.latest,
      latestWeeks: finding.latestTime,
    })),
    raised,
    cleared,
    repeats,
  }
}

/**
 * Before anything is read that a save builds on: jars of one study that are saved at the same moment wait for each
 * other here, so each sees what the others have committed.
 */
export async function lockStudy(trx: Trx, studyId: string): Promise<void> {
  await trx.selectFrom('study').select('id').where('id', '=', studyId).forUpdate().executeTakeFirst()
}

/** Null where there is no such jar in a pull. */
export async function lockStudyOfPullJar(trx: Trx, pullJarId: string): Promise<string | null> {
  const study = await trx
    .selectFrom('study')
    .select('id')
    .where('id', '=', (eb) => eb.selectFrom('pullJar').select('studyId').where('pullJar.id', '=', pullJarId))
    .forUpdate()
    .executeTakeFirst()
  return study?.id ?? null
}

/** Series of which nothing can be told any more, their only readings being void, are none. */
async function upsertSeries(
  trx: Trx,
  { study }: Frame,
  only: ReadonlySet<string> | null,
  assessed: readonly Assessed[],
): Promise<void> {
  const studyId = study.id
  const told = assessed.map(({ unit }) => `${unit.batch.id} ${unit.station.id} ${unit.attribute}`)
  const asked = pulledFor(study.plan).map((planned) => planned.attribute)
  const untold = trx
    .deleteFrom('series')
    .where('studyId', '=', studyId)
    .where('studyStationId', '=', sql<string>`any(${study.stations.map((one) => one.id)}::uuid[])`)
    .where(sql<boolean>`batch_id || ' ' || study_station_id || ' ' || attribute <> all(${told}::text[])`)
    .where('attribute', '=', sql<string>`any(${asked.filter((key) => !only || only.has(key))}::text[])`)
  if (assessed.length === 0) return void (await untold.execute())
  await trx
    .with('untold', () => untold)
    .insertInto('series')
    .values(
      assessed.map(({ unit, finding }) => ({
        id: newId(),
        studyId,
        batchId: unit.batch.id,
        studyStationId: unit.station.id,
        attribute: unit.attribute,
        standing: finding.standing,
        used: finding.used,
        outSinceWeeks: outSince(finding),
        leavesAtWeeks: finding.leavesAt,
        latestValue: finding.latest,
        latestWeeks: finding.latestTime,
        finding: JSON.stringify(finding),
      })),
    )
    .onConflict((conflict) =>
      conflict.columns(['studyId', 'batchId', 'studyStationId', 'attribute']).doUpdateSet((eb) => ({
        standing: eb.ref('excluded.standing'),
        used: eb.ref('excluded.used'),
        outSinceWeeks: eb.ref('excluded.outSinceWeeks'),
        leavesAtWeeks: eb.ref('excluded.leavesAtWeeks'),
        latestValue: eb.ref('excluded.latestValue'),
        latestWeeks: eb.ref('excluded.latestWeeks'),
        finding: eb.ref('excluded.finding'),
        computedAt: eb.ref('excluded.computedAt'),
      })),
    )
    .execute()
}

/** The first time of the unbroken run in which the series is out now. */
function outSince({ standing, points }: SeriesFinding): number | null {
  if (standing !== 'out') return null
  const lastInside = points.findLastIndex((point) => point.standing !== 'out')
  return points[lastInside + 1]?.time ?? null
}
