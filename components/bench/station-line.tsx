import { LargeCaution, useCaution } from '@/components/bench/station-caution'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** Where the jar stands, what to mind there, and the way out for a jar that cannot be read. */
export function StationLine({ jar, onMiss }: { jar: BenchJarPage; onMiss: (() => void) | null }) {
  const { id, name, temperatureC, caution } = jar.station
  const { isNew, noteRead } = useCaution({ stationId: id, day: jar.today, caution })
  return (
    <>
      {isNew ? (
        <div className="px-4 py-1 sm:px-7">
          <LargeCaution caution={caution} onRead={noteRead} />
        </div>
      ) : null}
      <div className="order-last flex flex-wrap items-center justify-between gap-x-3 px-4 py-1 text-17 sm:order-none sm:px-7">
        <p>
          {name}
          {temperatureC === null ? '' : `, ${temperatureC} °C`}. {caution && !isNew ? <b>{caution}</b> : null}
        </p>
        {onMiss ? (
          <button type="button" className="min-h-16 underline underline-offset-4" onClick={onMiss}>
            Cannot be read
          </button>
        ) : null}
      </div>
    </>
  )
}
