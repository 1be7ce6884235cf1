import { sql, type RawBuilder, type SqlBool } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { attributeName } from '@/lib/reading/schema/attributes'
import { cellsOf } from '@/lib/study/rules/cells'
import { weeksBetween } from '@/lib/study/rules/calendar'
import {
  ledgerHeadline,
  nextOne,
  worstShelf,
  type LedgerRow,
  type LedgerSummary,
} from '@/lib/study/rules/ledger'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { all, likeTyped, naturally, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import { listShelfParts } from './shelf-parts'
import { studiesOf } from './scope'

type Query = ListQuery<'is' | 'standing' | 'client' | 'station' | 'by' | 'from' | 'to'>

/** One page of the ledger: each study with its worst shelf, its standing, its next pull and who is next. */
export async function listStudies(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, studySource(db, actor, query), query)
  const states = await countStates(db, actor)
  // The headline tells of all that are searched for, not of the standing that is picked among them.
  const summary = await summarize(db, actor, { ...query, filters: { ...query.filters, standing: '' } })
  const choices = await listChoices(db, actor)
  return { ...page, counts: states, ...ledgerHeadline(summary, query), choices }
}
export type Ledger = Awaited<ReturnType<typeof listStudies>>

export function studySource(db: Db, actor: Actor, query: Query): Source<LedgerRow> {
  return {
    from,
    where: whereOf(actor, query),
    id: sql`study.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('study.code'),
      client: naturally('client.name'),
      standing: { by: worst, kind: 'number' },
      next: { by: nextPullOn, kind: 'day' },
      title: naturally('study.title'),
      started: { by: sql`study.started_on`, kind: 'day' },
      weeks: { by: sql`study.end_weeks`, kind: 'number' },
    },
    rows: (ids) => ledgerRows(db, actor, ids),
    idOf: (row) => row.id,
    // Each brings its series and readings with it.
    atOnce: 50,
  }
}

const from = sql`study left join client on client.id = study.client_id join person on person.id = study.created_by`
const today = sql`(app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date`

/** As worstShelf orders series: by standing, then what waits for its repeat, then the share of the band used. */
const worst = sql`(select coalesce(max(
    1000000 * array_position(array['steady', 'leaning', 'out'], series.standing)
    + case when exists (select from flag where flag.study_id = series.study_id and flag.state = 'open'
        and flag.rule in ('out', 'onset') and flag.study_station_id = series.study_station_id
        and flag.batch_id = series.batch_id and flag.attribute = series.attribute) then 100000 else 0 end
    + least(coalesce(series.used, 0), 99999)), 0)
  from series join study_batch on study_batch.study_id = series.study_id and study_batch.batch_id = series.batch_id
    and not study_batch.is_reference
  where series.study_id = study.id)`

const nextPullOn = sql`(select min(pull.due_on) from pull_jar join pull on pull.id = pull_jar.pull_id
  where pull_jar.study_id = study.id and pull_jar.state in ('due', 'resting'))`

function whereOf(actor: Actor, { q, filters }: Query): RawBuilder<SqlBool>[] {
  const { is, standing, client, station, by, from: first, to: last } = filters
  const typed = likeTyped(q)
  const rank = ['untold', 'steady', 'leaning', 'out'].indexOf(standing)
  return [
    studiesOf(actor),
    ...(is ? [sql<SqlBool>`study.state = ${is}`] : []),
    ...(standing ? [sql<SqlBool>`floor(${worst} / 1000000) = ${rank}`] : []),
    ...(client ? [sql<SqlBool>`client.name = ${client}`] : []),
    ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
    ...(station
      ? [
          sql<SqlBool>`exists (select from study_station ss join station on station.id = ss.station_id
            where ss.study_id = study.id and station.name = ${station})`,
        ]
      : []),
    ...(first ? [sql<SqlBool>`study.started_on >= ${first}::date`] : []),
    ...(last ? [sql<SqlBool>`study.started_on <= ${last}::date`] : []),
    ...(q
      ? [
          sql<SqlBool>`(study.code ilike ${typed} or study.title ilike ${typed} or client.name ilike ${typed}
            or study.id in (
              select study_id from jar where code ilike ${typed}
              union all
              select sb.study_id from study_batch sb join batch b on b.id = sb.batch_id
                join formula_version fv on fv.id = b.formula_version_id join formula f on f.id = fv.formula_id
                where b.code ilike ${typed} or f.name ilike ${typed} or f.code ilike ${typed}))`,
        ]
      : []),
  ]
}

async function ledgerRows(db: Db, actor: Actor, ids: string[]) {
  const found = await studiesWith(db, ids)
  const parts = await listShelfParts(db, ids)
  return found.map((study): LedgerRow => {
    const own = parts.of(study.id)
    const shelf = worstShelf(own.series, own.stations, own.flags)
    const next = nextOne(study, own)
    return {
      id: study.id,
      code: study.code,
      title: study.title,
      state: study.state,
      batches: own.batches.map((batch) => batch.code),
      references: own.references.map((batch) => batch.code),
      formulaName: own.batches[0]?.formulaName ?? '',
      clientName: study.clientName,
      endWeeks: study.endWeeks,
      elapsedWeeks: Math.min(study.endWeeks, weeksBetween(study.startedOn, study.endedOn ?? study.today)),
      standing: shelf.standing,
      worst: shelf.series
        ? {
            attribute: shelf.series.attribute,
            label: attributeName(shelf.series.attribute),
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
              // The ledger draws jars and writes no values.
              plan: { attributes: [] },
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
}

async function studiesWith(db: Db, ids: string[]) {
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
      sql<string>`${today}`.as('today'),
    ])
    .where(sql<SqlBool>`study.id = any(${ids}::uuid[])`)
    .execute()
}

/** What the headline counts, of every page: standings, and the jars of today as nextOne tells them. */
async function summarize(db: Db, actor: Actor, query: Query): Promise<LedgerSummary> {
  const { rows } = await sql<LedgerSummary>`
    with shown as (
      select study.id, ${worst} as worst, ${nextPullOn} as next_on from ${from} where ${all(whereOf(actor, query))}),
    jars as (
      select pull_jar.study_id, pull_jar.state from shown
      join pull_jar on pull_jar.study_id = shown.id join pull on pull.id = pull_jar.pull_id
      where shown.next_on <= ${today} and pull_jar.state <> 'missed'
        and (pull.due_on = ${today} or (pull.due_on < ${today} and pull_jar.state <> 'done')))
    select count(*) as total, count(*) filter (where worst >= 3000000) as "out",
      count(*) filter (where worst >= 2000000 and worst < 3000000) as leaning,
      (select count(*) from jars) as due, (select count(*) from jars where state = 'done') as done,
      count(*) filter (where next_on <= ${today}) as studies_today
    from shown
  `.execute(db)
  return rows[0]!
}

async function countStates(db: Db, actor: Actor) {
  return db
    .selectFrom('study')
    .select((eb) => [
      eb.fn.countAll<number>().filterWhere('state', '=', 'running').as('running'),
      eb.fn.countAll<number>().filterWhere('state', '=', 'closed').as('closed'),
    ])
    .where(studiesOf(actor))
    .executeTakeFirstOrThrow()
}
