import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { gramsText } from '@/lib/batch/rules/weighing'
import { dayAndHour } from './balance-choice'

type Line = BatchPage['weighings'][number]
type Props = { line: Line; supersedes: string; onCorrect: (portion: Line['portions'][number]) => void }

/** What was weighed of a line so far, each with its time and who; what was corrected stays, struck. */
export function PortionList({ line, supersedes, onCorrect }: Props) {
  if (!line.portions.length) return null
  const gone = new Set(line.portions.map((portion) => portion.supersedes))
  return (
    <ol aria-label={`Weighed of ${line.inciName}`} className="mt-3 border-t border-rule">
      {line.portions.map((portion) => {
        const isGone = gone.has(portion.id)
        return (
          <li
            key={portion.id}
            className="flex min-h-16 items-center justify-between gap-3 border-b border-hair py-1 lg:min-h-11"
          >
            <p className="text-17 leading-tight">
              <b className={isGone ? 'line-through' : ''}>{gramsText(portion.netG)} g</b>
              {portion.tareTyped ? ` (${portion.grossTyped} less ${portion.tareTyped})` : ''}
              <span className="block text-15 text-soft">
                {[
                  portion.lot ? `lot ${portion.lot}` : '',
                  portion.balance,
                  `${portion.by}, ${dayAndHour(portion.weighedAt)}`,
                  portion.isFromPaper ? `from paper, typed ${dayAndHour(portion.recordedAt)}` : '',
                  portion.note,
                  portion.reason ? `corrected: ${portion.reason}` : '',
                ]
                  .filter(Boolean)
                  .join(', ')}
              </span>
              {portion.balanceDoubt ? (
                <span className="block text-15 text-alarm">{portion.balanceDoubt}</span>
              ) : null}
            </p>
            {isGone ? (
              <span className="text-15 text-soft">corrected</span>
            ) : (
              <button
                type="button"
                aria-pressed={supersedes === portion.id}
                onClick={() => onCorrect(portion)}
                className="min-h-16 shrink-0 px-3 text-17 underline underline-offset-4 lg:min-h-11"
              >
                {supersedes === portion.id ? 'Leave it' : 'Correct'}
                <span className="sr-only"> {gramsText(portion.netG)} g</span>
              </button>
            )}
          </li>
        )
      })}
    </ol>
  )
}
