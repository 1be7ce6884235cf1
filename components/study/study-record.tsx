import { Empty } from '@/components/ui/empty'
import type { StudyBatchRow } from '@/lib/study/queries/head'
import type { ShownStudy } from '@/lib/study/queries/sheet'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import type { TrailPage } from '@/lib/trail/queries'
import Link from 'next/link'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = {
  study: ShownStudy
  batches: StudyBatchRow[]
  rights: StudyRights
  trail: TrailPage
  timeZone: string
}

/** What was done in this study, by whom, when and why, newest first. */
export function StudyRecord({ study, batches, rights, trail, timeZone }: Props) {
  const { entries, next } = trail
  return (
    <>
      <StudyHeading
        study={study}
        batches={batches}
        part="record"
        rights={rights}
        headline={[
          { text: 'Every change', isStrong: true },
          { text: ' of this study, newest first', isStrong: false },
        ]}
        sentence="Written by the database itself, one entry a changed row; none can be altered."
      />
      {entries.length === 0 ? (
        <Empty
          title="Nothing of yours is here"
          sentence="You see your own entries; QA and the manager see all of them."
        />
      ) : (
        <div className="relative mt-5 overflow-x-auto" role="region" aria-label="Entries" tabIndex={0}>
          <table className="w-full border-collapse text-15">
            <caption className="sr-only">Record of {study.code}</caption>
            <thead>
              <tr className="border-b-[1.75px] border-ink text-left text-13 text-soft [&_th]:px-2 [&_th]:py-1.5 [&_th]:font-430 [&_th:first-child]:pl-0">
                <th scope="col">number</th>
                <th scope="col">when</th>
                <th scope="col">who</th>
                <th scope="col">what</th>
                <th scope="col">before and after</th>
                <th scope="col">why</th>
              </tr>
            </thead>
            <tbody>
              {entries.map((entry) => (
                <tr
                  key={entry.id}
                  className="border-b border-hair align-baseline [&_td]:px-2 [&_td]:py-1.5 [&_td:first-child]:pl-0"
                >
                  <td className="text-soft">{entry.id}</td>
                  <td className="whitespace-nowrap">
                    {moment(entry.at, timeZone)}
                    {entry.isShifted ? (
                      <span className="block text-13 text-soft">clock set by the demo</span>
                    ) : null}
                  </td>
                  <td className="whitespace-nowrap">{entry.actorName}</td>
                  <td className="whitespace-nowrap">{whatOf(entry)}</td>
                  <td className="max-w-[560px] text-14 break-words">{changesOf(entry)}</td>
                  <td className="max-w-[240px]">{entry.reason ?? ''}</td>
                </tr>
              ))}
            </tbody>
          </table>
          {next === null ? null : (
            <p className="mt-3">
              <Link
                href={`/studies/${encodeURIComponent(study.code)}/record?before=${next}`}
                className="underline underline-offset-4"
              >
                Older entries
              </Link>
            </p>
          )}
        </div>
      )}
    </>
  )
}

type Entry = TrailPage['entries'][number]

const acts: Record<string, string> = { insert: 'made', update: 'changed', delete: 'removed' }
const things: Record<string, string> = {
  study: 'study',
  study_batch: 'batch of the study',
  study_station: 'station of the study',
  study_follower: 'follower',
  pull: 'pull',
  pull_jar: 'jar of a pull',
  jar: 'jar',
  reading: 'reading',
  photo: 'photo',
  flag: 'flag',
  shelf_case: 'case',
  study_amendment: 'amendment',
}

function whatOf({ tableName, operation, event }: Entry): string {
  if (event) return event
  const thing = things[tableName ?? ''] ?? (tableName ?? '').replaceAll('_', ' ')
  return `${thing} ${acts[operation] ?? operation}`
}

/** Of a new row what says something, of a change what differs. */
function changesOf({ before, after, operation }: Entry): string {
  const was = (before ?? {}) as Record<string, unknown>
  const became = (after ?? {}) as Record<string, unknown>
  if (operation === 'update') {
    return Object.keys(became)
      .filter((field) => field !== 'version' && shown(was[field]) !== shown(became[field]))
      .map((field) => `${words(field)}: ${shown(was[field])}, now ${shown(became[field])}`)
      .join('; ')
  }
  const row = operation === 'delete' ? was : became
  return Object.keys(row)
    .filter((field) => !/(^|_)(id|by|plan)$|^version$|_at$/.test(field) && shown(row[field]) !== 'nothing')
    .map((field) => `${words(field)} ${shown(row[field])}`)
    .join(', ')
}

function words(field: string): string {
  return field.replace(/_(g|mm|c)$/, '').replaceAll('_', ' ')
}

function shown(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'nothing'
  if (typeof value === 'object') {
    const text = JSON.stringify(value)
    return text === '{}' || text === '[]' ? 'nothing' : text.length > 160 ? `${text.slice(0, 157)}...` : text
  }
  return String(value)
}

function moment(instant: string, timeZone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'medium' }).format(new Date(instant))
  return `${spokenDay(dayIn(timeZone, instant))}, ${time}`
}
