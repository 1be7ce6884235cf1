import { Figure } from '@/components/marks/figure'
import { regressionKeyShapes, regressionShapes } from '@/components/charts/regression-shapes'
import type { Computed } from '@/lib/shelf-case/rules/build'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'
import { regressionView } from '@/lib/shelf-case/rules/plot'

const size = { width: 520, height: 250 }

/** The regression that decides, drawn as the report draws it. */
export function RegressionPlot({
  evidence,
  content,
  months,
}: {
  evidence: AttributeEvidence
  content: Computed
  months: number
}) {
  const view = regressionView(evidence, 60)
  if (!view || !evidence.calc) return null
  const { label } = view
  const crossing = evidence.crossingMonths
  return (
    <section className="min-w-0">
      <h2 className="text-20 font-650">
        {evidence.label} <span className="text-15 font-430 text-soft">{view.unit}, by month</span>
      </h2>
      <div
        className="mt-2 overflow-x-auto"
        role="region"
        aria-label={`${evidence.label} by month`}
        tabIndex={0}
      >
        <Figure
          shapes={regressionKeyShapes(
            view.batches.map((b) => b.name),
            Math.min(440, view.batches.length * 110),
          )}
          view={{ x: 0, y: 0, width: size.width, height: 18 }}
        />
        <Figure
          title={`${evidence.label} of ${view.batches.length} batches by month. ${crossing === null ? 'The bound stays inside for 60 months.' : `The bound meets the limit at ${crossing.toFixed(1)} months.`}`}
          view={{ x: 0, y: 0, ...size }}
          shapes={regressionShapes({
            ...size,
            batches: view.batches,
            lower: view.lower,
            upper: view.upper,
            limitText: {
              ...(view.lower === null ? {} : { lower: `allowed down to ${label(view.lower)}` }),
              ...(view.upper === null ? {} : { upper: `allowed up to ${label(view.upper)}` }),
            },
            dataMonths: content.dataMonths,
            proposedMonths: months,
            crossingMonths: crossing,
            crossingSide: evidence.calc.output.batches.find((b) => b.crossing === crossing)?.side ?? null,
            decides: evidence.decidedBy,
            format: label,
          })}
        />
      </div>
      <p className="mt-1 text-13 text-soft">
        Fitted: {evidence.scale}. Dashed: carried on by the line. Dotted: its 95 % confidence bound.
      </p>
    </section>
  )
}
