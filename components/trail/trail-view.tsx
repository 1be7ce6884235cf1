import Link from 'next/link'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { trailAddress, type ShownTrail } from './trail-address'
import type { Change } from './trail-changes'
import { TrailFilter } from './trail-filter'
import type { TrailLine } from './trail-lines'

type Props = {
  shown: ShownTrail
  isStudyKnown: boolean
  lines: TrailLine[]
  /** Id below which the older ones begin. */
  next: number | null
  timeZone: string
  /** Whose entries this person sees, in a sentence. */
  scope: string
}

/** Who did what, when, and why: each changed row as the database wrote it down. */
export function TrailView({ shown, isStudyKnown, lines, next, timeZone, scope }: Props) {
  return (
    <>
      <Heading
        crumb={`Record of every change, the latest written first. Times of ${timeZone.replace('_', ' ')}`}
        headline={<Headline line={lines[0]} />}
        sentence={`Written by the database itself, one entry for each changed row; none can be altered. ${scope}`}
      />
      <TrailFilter key={`${shown.table} ${shown.study}`} shown={shown} isStudyKnown={isStudyKnown} />
      {lines.length === 0 ? (
        <Empty
          title={shown.table || shown.study ? 'No such entry' : 'Nothing is written yet'}
          sentence={
            shown.table || shown.study ? `Nothing of that kind is in what you may read. ${scope}` : scope
          }
          act={
            shown.table || shown.study ? <LinkButton href="/trail">Show everything</LinkButton> : undefined
          }
        />
      ) : (
        <Lines lines={lines} />
      )}
      <nav aria-label="Pages of the record" data-screen-only className="mt-3 flex gap-8 text-15">
        {shown.before ? (
          <Link
            href={trailAddress({ ...shown, before: null })}
            className="inline-flex min-h-11 items-center underline underline-offset-4"
          >
            Latest entries
          </Link>
        ) : null}
        {next === null ? null : (
          <Link
            href={trailAddress({ ...shown, before: next })}
            className="inline-flex min-h-11 items-center underline underline-offset-4"
          >
            Older entries
          </Link>
        )}
      </nav>
    </>
  )
}

function Headline({ line }: { line: TrailLine | undefined }) {
  if (!line) return <>Nothing is written here</>
  const what = [line.thing || 'Something', line.name].filter(Boolean).join(' ')
  // What a person did with themselves, such as signing in, the application wrote down for them.
  if (line.isEvent && line.name)
    return (
      <>
        <b>{line.name}</b> {line.act}, {line.day}
      </>
    )
  return (
    <>
      {what} {line.act} by <b>{line.who}</b>, {line.day}
    </>
  )
}

function Lines({ lines }: { lines: TrailLine[] }) {
  const head = 'h-9 px-2 align-bottom text-left text-13 font-430 text-soft first:pl-0 last:pr-0'
  return (
    <table className="mt-2 block w-full border-collapse text-15 sm:table">
      <caption className="sr-only">Record, the latest written first</caption>
      <thead className="hidden sm:table-header-group">
        <tr className="border-b-[1.75px] border-ink">
          <th scope="col" className={`${head} w-[64px]`}>
            entry
          </th>
          <th scope="col" className={`${head} w-[170px]`}>
            when and who
          </th>
          <th scope="col" className={`${head} w-[190px]`}>
            what
          </th>
          <th scope="col" className={head}>
            before and after
          </th>
          <th scope="col" className={`${head} hidden w-[24%] lg:table-cell`}>
            why
          </th>
        </tr>
      </thead>
      <tbody className="block sm:table-row-group">
        {lines.map((line) => (
          <Row key={line.id} line={line} />
        ))}
      </tbody>
    </table>
  )
}

function Row({ line }: { line: TrailLine }) {
  const { name, href } = line
  const cell = 'block py-0.5 sm:table-cell sm:px-2 sm:py-2 first:pl-0 last:pr-0'
  return (
    <tr className="block border-b border-hair py-2 align-top sm:table-row sm:py-0">
      <td className={`${cell} text-soft`}>{line.id}</td>
      <td className={cell}>
        {line.who}
        <span className="block text-13 text-soft">{line.when}</span>
        {line.isShifted ? <span className="block text-13 text-soft">clock set by the demo</span> : null}
      </td>
      <td className={`${cell} font-600`}>
        {line.thing}{' '}
        {name ? (
          href ? (
            <Link href={href} className="underline underline-offset-4">
              {name}
            </Link>
          ) : (
            name
          )
        ) : null}{' '}
        <span className="font-430">{line.act}</span>
      </td>
      <td className={`${cell} min-w-0 text-14 [overflow-wrap:anywhere]`}>
        <Changes changes={line.changes} isUpdate={line.isUpdate} />
        {line.reason ? <p className="mt-1 lg:hidden">Why: {line.reason}</p> : null}
      </td>
      <td className={`${cell} hidden lg:table-cell`}>{line.reason}</td>
    </tr>
  )
}

/** What was and what is, in words: what is new stands in full ink, what it replaced is struck through. */
function Changes({ changes, isUpdate }: { changes: Change[]; isUpdate: boolean }) {
  if (changes.length === 0) return null
  if (!isUpdate) {
    return (
      <p>
        {changes.map(({ field, before, after }, index) => (
          <span key={field}>
            {index > 0 ? ', ' : ''}
            <span className="text-soft">{field}</span> {after ?? before}
          </span>
        ))}
      </p>
    )
  }
  return (
    <ul>
      {changes.map(({ field, before, after }) => (
        <li key={field}>
          <span className="text-soft">{field}</span>{' '}
          {before === null ? null : (
            <>
              <span className="sr-only">was </span>
              <s className="text-soft">{before}</s>{' '}
            </>
          )}
          {before === null ? null : <span className="text-soft">now </span>}
          {after === null ? <span>nothing</span> : <b className="font-600">{after}</b>}
        </li>
      ))}
    </ul>
  )
}
