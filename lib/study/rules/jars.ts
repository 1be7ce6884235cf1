import { askedWeeks } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'

export type PlannedJar = {
  batchId: string
  /** Position of its station in the plan; null for the jars of the initial and for retains. */
  position: number | null
  kind: 'watch' | 'measuring' | 'spare' | 'retain'
  state: 'stored' | 'spent' | 'kept'
  /** Weeks at which it is asked for: all of its station's for a watch jar, one for a measuring jar. */
  weeks: number[]
  /** Which outside laboratory's jar it is. */
  setAsideFor?: string
}

/** Every jar of a study: what it is for, where it stands, when it is asked for. */
export function plannedJars(plan: ProtocolPlan, batchIds: string[]): PlannedJar[] {
  return batchIds.flatMap((batchId) => [
    ...plan.stations.flatMap((station, position) => [
      ...times(station.watchJars, () =>
        stored(batchId, position, 'watch', askedWeeks(plan, station, 'watch')),
      ),
      ...askedWeeks(plan, station, 'measuring').flatMap((week) =>
        times(station.measuringJarsPerPull, () => stored(batchId, position, 'measuring', [week])),
      ),
      ...times(station.spares, () => stored(batchId, position, 'spare', [])),
    ]),
    ...times(plan.initialJars, (): PlannedJar => ({
      ...nowhere(batchId),
      kind: 'measuring',
      state: 'spent',
    })),
    ...times(plan.retains, (): PlannedJar => ({ ...nowhere(batchId), kind: 'retain', state: 'kept' })),
    ...(plan.setAside ?? []).flatMap(({ what, jars }) =>
      times(jars, (): PlannedJar => ({
        ...nowhere(batchId),
        kind: 'retain',
        state: 'kept',
        setAsideFor: what,
      })),
    ),
  ])
}

function stored(batchId: string, position: number, kind: PlannedJar['kind'], weeks: number[]): PlannedJar {
  return { batchId, position, kind, state: 'stored', weeks }
}

function nowhere(batchId: string) {
  return { batchId, position: null, weeks: [] }
}

function times<T>(count: number, make: () => T): T[] {
  return Array.from({ length: count }, make)
}
