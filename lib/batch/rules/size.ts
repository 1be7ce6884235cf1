import { jarPlanInput } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { gramsOfJars } from '@/lib/science/jar-grams'
import { jarPlan } from '@/lib/science/jar-plan'
import { batchSizeFor } from '@/lib/science/making'

/** [practice] Of what is weighed in, this much comes out of the vessel; a lab that knows better types its own. */
export const usualYieldPercent = 95

export type GramsTo = { name: string; jars: number; grams: number }

/** Where a protocol's grams go, by kind of jar; the loss in filling is in each. */
export function gramsOf(plan: ProtocolPlan): { jars: number; grams: number; parts: GramsTo[] } {
  // What the batch gives plays no part: only what is wanted is asked.
  const { jars, grams, ...kinds } = jarPlan(jarPlanInput(plan, 1))
  const part = (name: string, count: number) => ({
    ...{ name, jars: count, grams: gramsOfJars(count, plan.fillG, plan.lossPercent) },
  })
  const parts = [
    part('watch jars', kinds.watchJars),
    part('measuring jars', kinds.measuringJars),
    part('spares', kinds.spares),
    part('opened for the initial', plan.initialJars),
    part('retained', plan.retains),
  ]
  return { jars, grams, parts: parts.filter((one) => one.jars > 0) }
}

/** The size that is enough for these protocols on one batch; null where none can be computed. */
export function sizeFor(plans: readonly ProtocolPlan[], yieldPercent: number): number | null {
  if (!plans.length || !(yieldPercent > 0 && yieldPercent <= 100)) return null
  return batchSizeFor(
    plans.map((plan) => gramsOf(plan).grams),
    yieldPercent,
  )
}
