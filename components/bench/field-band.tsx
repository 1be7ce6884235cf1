import { bandText } from '@/components/bench/verdict'
import { BandBar } from '@/components/marks/band-bar'
import type { BenchField } from '@/lib/bench/rules'
import { shownValue } from '@/lib/study/rules/words'

type Props = {
  field: BenchField
  now: number | null
  width: number
  /** Without its words, where they stand beside it. */
  isQuiet?: boolean
}

/** The band that the value has to stay in, with the last and the one being typed on it. */
export function FieldBand({ field, now, width, isQuiet = false }: Props) {
  const { lower, upper } = field.band ?? { lower: null, upper: null }
  const hasMarks = lower !== null || upper !== null
  return (
    <div className="mt-1 max-w-full overflow-hidden">
      <BandBar
        width={width}
        height={14}
        lower={lower}
        upper={upper}
        initial={field.initial}
        last={field.last[0]?.value ?? null}
        now={now}
        title={`${field.label}, ${bandText(field)}`}
        className="max-w-full"
      />
      <p
        className={`justify-between gap-3 text-17 text-soft ${isQuiet ? 'hidden' : 'flex'}`}
        style={{ maxWidth: width }}
      >
        <span>{bandText(field)}</span>
        {field.initial !== null && hasMarks ? <span>initial {shownValue(field, field.initial)}</span> : null}
      </p>
    </div>
  )
}
