import type { BenchDays } from '@/lib/bench/queries/days'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'

export type KnownDays = Omit<BenchDays, 'revision' | 'bench'>

/** Each jar's page by its code; a jar that is asked for twice shows what is asked first. */
export function pagesByCode({ jars, instruments }: KnownDays): Map<string, BenchJarPage> {
  const pages = new Map<string, BenchJarPage>()
  for (const jar of jars) if (!pages.has(jar.code)) pages.set(jar.code, { ...jar, instruments })
  return pages
}

/** The Bench of a later day, made from what was read on an earlier one: its jars are those that have come due since. */
export function benchOn(today: string, bench: Bench, days: KnownDays): Bench {
  if (today <= bench.today) return bench
  const jars = days.jars.filter((jar) => jar.state === 'resting' || jar.dueOn <= today)
  const stations = bench.stations.map((station) => {
    const here = jars
      .filter((jar) => jar.station.id === station.id)
      .map((jar) => ({ ...jar, isOverdue: jar.windowTo < today, isLastDay: jar.windowTo === today }))
    return { ...station, jars: here, counts: countsOf(here) }
  })
  return { ...bench, today, stations, counts: countsOf(stations.flatMap((station) => station.jars)) }
}

function countsOf(jars: readonly { state: string; isOverdue: boolean }[]): Bench['counts'] {
  const count = (state: string) => jars.filter((jar) => jar.state === state).length
  return {
    total: jars.length,
    ...{ due: count('due'), resting: count('resting'), done: 0, missed: 0 },
    overdue: jars.filter((jar) => jar.isOverdue).length,
  }
}

/** The day that the lab's calendar shows by this device's clock. */
export function labDayHere(zone: string): string {
  return new Date().toLocaleDateString('sv-SE', { timeZone: zone })
}
