import { sql } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { attributeOf, type AttributeKey } from '@/lib/reading/schema/attributes'
import { cellsOf } from '@/lib/study/rules/cells'
import { weeksBetween } from '@/lib/study/rules/calendar'
import { ledgerHeadline, nextOne, sorted, worstShelf, type LedgerRow } from '@/lib/study/rules/ledger'
import type { StudyFilter } from '@/lib/study/schema'
import { listShelfParts } from './shelf-parts'
import { studiesOf } from './scope'

/** The ledger of studies: each with its worst shelf, its standing, its next pull and who is next. */
export async function listStudies(db: Db, actor: Actor, filter: StudyFilter) {
  const found = await findStudies(db, actor, filter)
  const counts = await countStudies(db, actor)
  const ids = found.map((study) => study.id)
  const parts = await listShelfParts(db, ids)
  const rows = found.map((study): LedgerRow => {
    const own = parts.of(study.id)
    const shelf = worstShelf(own.series, own.stations, own.flags)
    const next = nextOne(study, own)
    return {
      id: study.id,
      code: study.code,
      title: study.title,
      state: study.state,
      batches: own.batches.map((batch) => batch.code),
      formulaName: own.batches[0]?.formulaName ?? '',
      clientName: study.clientName,
      endWeeks: study.endWeeks,
      elapsedWeeks: Math.min(study.endWeeks, weeksBetween(study.startedOn, study.endedOn ?? study.today)),
      standing: shelf.standing,
      worst: shelf.series
        ? {
            attribute: shelf.series.attribute,
            label: attributeOf(shelf.series.attribute as AttributeKey).label,
            used: shelf.series.used,
            latest: shelf.series.latestValue,
            leavesAtWeeks: shelf.series.leavesAtWeeks,
            isPending: shelf.isPending,
          }
        : null,
      startedOn: study.startedOn,
      station: shelf.station
        ? {
            kind: shelf.station.kind,
            temperatureC: shelf.station.temperatureC,
            cells: cellsOf(shelf.series?.batchId ?? own.batches[0]!.id, shelf.station.id, {
              ...own,
              today: study.today,
              fillHeightMm: study.fillHeightMm,
            }).map(({ weeks, state, posture, topPercent, bottomPercent }) => ({
              weeks,
              state,
              posture,
              topPercent,
              bottomPercent,
            })),
          }
        : null,
      timePoints: Math.max(0, ...own.series.map((one) => one.finding.points.length)),
      ...next,
      isMine: !isClientOnly(actor) && next.flags > 0 && study.createdBy === actor.personId,
    }
  })
  const shown = rows.filter((row) => filter.standing === 'any' || row.standing === filter.standing)
  return { rows: sorted(shown, filter.sort), counts, ...ledgerHeadline(rows, filter) }
}
export type Ledger = Awaited<ReturnType<typeof listStudies>>

async function findStudies(db: Db, actor: Actor, filter: StudyFilter) {
  const typed = `%${filter.q.replace(/[\\%_]/g, '\\$&')}%`
  return db
    .selectFrom('study')
    .leftJoin('client', 'client.id', 'study.clientId')
    .innerJoin('person', 'person.id', 'study.createdBy')
    .select(['study.id', 'study.code', 'study.title', 'study.state', 'study.startedOn', 'study.endedOn'])
    .select([
      'study.endWeeks',
      'study.createdBy',
      'client.name as clientName',
      'person.initials as startedBy',
    ])
    .select([
      sql<number>`(study.plan->>'fillHeightMm')::numeric`.as('fillHeightMm'),
      sql<string>`(app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date`.as('today'),
    ])
    .where('study.state', '=', filter.is)
    .where(studiesOf(actor))
    .$if(filter.q !== '', (query) =>
      query.where(
        sql<boolean>`(study.code ilike ${typed} or study.title ilike ${typed} or client.name ilike ${typed}
          or exists (select from jar where jar.study_id = study.id and jar.code ilike ${typed})
          or exists (select from study_batch sb join batch b on b.id = sb.batch_id
            join formula_version fv on fv.id = b.formula_version_id join formula f on f.id = fv.formula_id
            where sb.study_id = study.id and (b.code ilike ${typed} or f.name ilike ${typed} or f.code ilike ${typed})))`,
      ),
    )
    .orderBy('study.code', 'desc')
    .limit(200)
    .execute()
}

async function countStudies(db: Db, actor: Actor) {
  return db
    .selectFrom('study')
    .select((eb) => [
      eb.fn.countAll<number>().filterWhere('state', '=', 'running').as('running'),
      eb.fn.countAll<number>().filterWhere('state', '=', 'closed').as('closed'),
    ])
    .where(studiesOf(actor))
    .executeTakeFirstOrThrow()
}
