import { PaperButton, type usePaper } from '@/components/bench/paper-switch'
import { LargeCaution, useCaution } from '@/components/bench/station-caution'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { capital } from '@/lib/study/rules/words'

type Props = {
  jar: BenchJarPage
  /** Where it can be typed in. */
  paper: ReturnType<typeof usePaper> | null
  onMiss: (() => void) | null
}

/** Where the jar stands, what to mind there, and the ways out: read on paper, or not to be read. */
export function StationLine({ jar, paper, onMiss }: Props) {
  const { id, name, temperatureC, caution } = jar.station
  const { isNew, noteRead } = useCaution({ stationId: id, day: jar.today, caution })
  return (
    <>
      {isNew ? (
        <div className="px-4 py-1 sm:hidden">
          <LargeCaution caution={caution} onRead={noteRead} />
        </div>
      ) : null}
      <div className="order-last flex flex-wrap items-center justify-between gap-x-3 px-4 py-1 text-17 sm:order-none sm:px-7">
        <p>
          {capital(name)}
          {temperatureC === null ? '' : `, ${temperatureC} °C`}. {caution && !isNew ? <b>{caution}</b> : null}
          {isNew ? <b className="hidden text-22 leading-tight sm:inline">{caution}</b> : null}
        </p>
        <div className="flex gap-5">
          {isNew ? (
            <button
              type="button"
              className="hidden min-h-16 underline underline-offset-4 sm:inline"
              onClick={noteRead}
            >
              Seen
            </button>
          ) : null}
          {paper ? <PaperButton paper={paper} /> : null}
          {onMiss ? (
            <button type="button" className="min-h-16 underline underline-offset-4" onClick={onMiss}>
              Cannot be read
            </button>
          ) : null}
        </div>
      </div>
    </>
  )
}
