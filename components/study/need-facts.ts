import { jarPlanInput, setAsideJars } from '@/lib/protocol/rules/plan'
import { jarPlanMethod } from '@/lib/science/methods/emulsion'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import type { Need } from './start-state'

export function needFacts(need: Need, of: 'jars' | 'grams' | 'short'): FigureFacts {
  const { plan, leftG } = need
  const results = {
    jars: exactly(need.jars, 'jars'),
    grams: exactly(need.grams, 'g'),
    short: exactly(need.shortG, 'g short'),
  }
  return factsOf(jarPlanMethod, {
    name: `Jars of ${need.batch.code}`,
    result: results[of],
    values: {
      watchJars: need.watchJars,
      measuringJars: need.measuringJars,
      spares: need.spares,
      initialJars: plan.initialJars,
      retains: plan.retains + setAsideJars(plan),
      fillG: plan.fillG,
      lossPercent: plan.lossPercent,
      batchG: leftG,
      grams: of === 'grams' ? null : need.grams,
      shortG: of === 'short' ? null : need.shortG,
    },
    input: jarPlanInput(plan, leftG),
  })
}
