import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** Where the jar stands, what to mind there, and the way out for a jar that cannot be read. */
export function StationLine({ jar, onMiss }: { jar: BenchJarPage; onMiss: (() => void) | null }) {
  const { name, temperatureC, caution } = jar.station
  return (
    <div className="flex flex-wrap items-center justify-between gap-3 px-4 pt-2.5 text-17 sm:px-7">
      <p>
        {name}
        {temperatureC === null ? '' : `, ${temperatureC} °C`}. {caution ? <b>{caution}</b> : null}
      </p>
      {onMiss ? (
        <button type="button" className="min-h-11 underline underline-offset-4" onClick={onMiss}>
          Cannot be read
        </button>
      ) : null}
    </div>
  )
}
