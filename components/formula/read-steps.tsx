import { Empty } from '@/components/ui/empty'
import type { FormulaStep } from '@/lib/formula/schema'

export function ReadSteps({ steps }: { steps: FormulaStep[] }) {
  if (!steps.length) return <Empty title="No process steps are written" />
  return (
    <ol className="max-w-[860px]">
      {steps.map((step, index) => (
        <li key={step.id} className="flex gap-4 border-b border-hair py-2.5">
          <span className="w-6 shrink-0 text-17 font-750">{index + 1}</span>
          <div>
            <p className="text-16">
              {step.phase ? <b>{step.phase}. </b> : null}
              {step.instruction}
            </p>
            <p className="text-14 text-soft">{conditionsText(step)}</p>
            {step.lookFor ? <p className="text-14">Look for: {step.lookFor}</p> : null}
            {step.caution ? <p className="text-14 font-600">{step.caution}</p> : null}
          </div>
        </li>
      ))}
    </ol>
  )
}

/** "300 rpm, 44 min, 28 °C", of what is prescribed or was done. */
export function conditionsText(step: {
  speedRpm: number | null
  minutes: number | null
  temperatureC: number | null
}): string {
  return [
    step.speedRpm === null ? '' : `${step.speedRpm} rpm`,
    step.minutes === null ? '' : `${step.minutes} min`,
    step.temperatureC === null ? '' : `${String(step.temperatureC).replace('-', '\u2212')} °C`,
  ]
    .filter(Boolean)
    .join(', ')
}
