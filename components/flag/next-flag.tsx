import Link from 'next/link'
import { FlagMark } from '@/components/marks/flag-mark'
import type { FlagPage } from '@/lib/flag/queries/one'
import { counted } from '@/lib/study/rules/words'

const graveness = ['out', 'leaning', 'flag', 'doubt']

/** The flag that follows this one as they wait, gravest first; after the last one the first comes round again. */
export function NextFlag({ flag }: { flag: FlagPage }) {
  const { others } = flag
  const rank = (one: { level: string; number: number }) => graveness.indexOf(one.level) * 1e9 + one.number
  const next = others.find((one) => rank(one) > rank(flag)) ?? others[0]
  if (!next) return <p className="text-15 text-soft">No other flag waits.</p>
  const count = others.length + (flag.state === 'open' ? 1 : 0)
  return (
    <nav aria-label="Flags that wait" data-screen-only className="flex items-center gap-3 text-15">
      <FlagMark number={next.number} solid={next.level === 'out'} title={`Flag ${next.number}`} />
      <span>
        {count === 1
          ? 'the only one that waits'
          : `next of ${counted(count, 'flag').replace(/ flags?$/, '')}`}
      </span>
      <Link
        href={`/flags/${next.number}`}
        className="inline-flex min-h-11 items-center pl-4 font-650 underline underline-offset-4"
      >
        {flag.state === 'open' ? 'Skip' : 'Next flag'}
      </Link>
    </nav>
  )
}
