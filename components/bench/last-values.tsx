import type { Slot } from '@/components/bench/draft'
import type { BenchField, LastValue } from '@/lib/bench/rules'
import { shortDay } from '@/lib/report/rules'
import { shownValue } from '@/lib/study/rules/words'

type Props = { field: BenchField; part?: Slot['part']; className?: string }

/** The last three of the same batch at the same station, the newest first, each with its day. */
export function LastValues({ field, part, className = '' }: Props) {
  const shown = field.last.slice(0, 3).flatMap((last) => {
    const text = part ? heightOf(last, part) : (last.word ?? valueText(field, last))
    return text === null ? [] : [{ id: last.readingId, text, day: last.day }]
  })
  if (shown.length === 0) return <p className={`text-17 text-soft ${className}`}>first reading</p>
  return (
    <p className={`text-17 ${className}`}>
      <HollowDot />{' '}
      {shown.map(({ id, text, day }) => (
        <span key={id} className="mr-3 inline-block whitespace-nowrap">
          {text} <span className="text-soft">{shortDay(day)}</span>
        </span>
      ))}
    </p>
  )
}

function valueText(field: BenchField, { value, typed }: LastValue): string {
  return value === null ? typed : shownValue(field, value)
}

/** Of a layer: its height on the ruler. */
export function heightOf({ detail }: LastValue, part: 'top' | 'bottom'): string | null {
  const mm = detail[part === 'top' ? 'topMm' : 'bottomMm']
  return typeof mm === 'number' ? mm.toFixed(1) : null
}

export function HollowDot() {
  return (
    <svg viewBox="0 0 16 16" width="16" height="16" aria-label="last" className="inline-block align-[-1px]">
      <circle cx="8" cy="8" r="5.5" fill="none" stroke="currentColor" strokeWidth="2.5" />
    </svg>
  )
}
