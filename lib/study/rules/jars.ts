import { planOfBatch, type Turn } from '@/lib/protocol/rules/batch-matrixing'
import { askedWeeks, jarsAtStation } from '@/lib/protocol/rules/plan'
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

/** The batches of a study and what stands beside it. */
export type TakenBatches = { batchIds: string[]; referenceIds: string[] }

/** The plan as each batch follows it: batches may take turns, references are measured every time. */
export function plansOfBatches(
  plan: ProtocolPlan,
  batchIds: string[],
  referenceIds: string[] = [],
): { batchId: string; plan: ProtocolPlan }[] {
  const own = (batchId: string, turn: Turn) => ({ batchId, plan: planOfBatch(plan, turn) })
  return [
    ...batchIds.map((batchId, place) => own(batchId, { place, of: batchIds.length })),
    ...referenceIds.map((batchId) => own(batchId, null)),
  ]
}

/** Places that a station of the plan needs for all batches. */
export function placesAt(plans: { plan: ProtocolPlan }[], position: number): number {
  return plans.reduce((sum, { plan }) => sum + jarsAtStation(plan, plan.stations[position]!), 0)
}

/** Every jar of a study: what it is for, where it stands, when it is asked for. */
export function plannedJars(
  all: ProtocolPlan,
  batchIds: string[],
  referenceIds: string[] = [],
): PlannedJar[] {
  return plansOfBatches(all, batchIds, referenceIds).flatMap(({ batchId, plan }) => [
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
