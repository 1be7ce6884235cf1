import { mktMethod } from '@/lib/science/methods/heat'
import { excursionMethod } from '@/lib/science/methods/making'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import { hoursOfEntries } from '@/lib/science/temperature-log'
import type { stationRecord } from '@/lib/station/queries/record'
import type { Excursion, StationLimits } from '@/lib/station/rules/record'

type Record = Awaited<ReturnType<typeof stationRecord>>

/** The temperatures of the log, each with the hours it stands for, as topic `mkt` takes them. */
export function recordFacts({ readings, log, mktC, meanC, minC, maxC }: Record): FigureFacts {
  const first = Date.parse(log[0]?.measuredAt ?? '')
  const hours = hoursOfEntries(log.map((entry) => (Date.parse(entry.measuredAt) - first) / 3_600_000))
  return factsOf(mktMethod, {
    result: exactly(mktC ?? 0, '°C'),
    when: 'Of the last 180 days, computed as it is shown.',
    values: { entries: readings, meanC, minC, maxC },
    // A thinned log is for drawing; the figure rests on every entry.
    ...(log.length < readings
      ? {}
      : {
          input: {
            temperaturesC: log.map((entry) => entry.temperatureC),
            ...(hours ? { hoursEach: hours } : {}),
          },
        }),
  })
}

export function excursionFacts(excursion: Excursion, { lowC, highC }: StationLimits): FigureFacts {
  return factsOf(excursionMethod, {
    result: exactly(excursion.hours, `h ${excursion.side} its limits`),
    values: { low: lowC, high: highC, extremeC: excursion.extremeC },
  })
}
