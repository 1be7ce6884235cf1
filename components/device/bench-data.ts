import { isSettledHere } from '@/components/bench/kept-jars'
import type { BenchDays } from '@/lib/bench/queries/days'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Bench } from '@/lib/bench/queries/today'

import type { OutboxItem } from './outbox-item'

export type KnownDays = Omit<BenchDays, 'revision' | 'bench'>

/** The pages of each jar by its code, one for each pull that asks for it, the earliest first. */
export function pagesByCode({ jars, instruments }: KnownDays): Map<string, BenchJarPage[]> {
  const pages = new Map<string, BenchJarPage[]>()
  for (const jar of jars) pages.set(jar.code, [...(pages.get(jar.code) ?? []), { ...jar, instruments }])
  return pages
}

/** A jar that is asked for in several pulls shows the first that is open, as the server has it and as this device knows. */
export function pageToShow(
  pages: readonly BenchJarPage[],
  bench: Bench | undefined,
  items: readonly OutboxItem[],
): BenchJarPage {
  const states = new Map(
    bench?.stations.flatMap((station) => station.jars.map((jar) => [jar.pullJarId, jar.state])),
  )
  const isToRead = (state: string | undefined) =>
    state === undefined || state === 'due' || state === 'resting'
  const open = pages.find((page) => isToRead(states.get(page.pullJarId)) && !isSettledHere(items, page))
  return open ?? pages[0]!
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
