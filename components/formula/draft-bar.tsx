'use client'

import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { DraftHandle } from './use-draft'

type Props = { formula: FormulaPage; handle: DraftHandle; onReload: () => void; onSaved: () => void }

/** What happened to the draft: kept over a reload, refused, or saved by someone else meanwhile. */
export function DraftBar({ formula, handle, onReload, onSaved }: Props) {
  const { refusal, problems, isKept, isDirty } = handle
  const count = Object.keys(problems.lines).length + Object.keys(problems.steps).length
  const isStale = refusal?.status === 412
  return (
    <div className="mt-3 flex flex-col gap-2 empty:hidden">
      {isStale ? (
        <ErrorNote
          error={refusal}
          act={
            <div className="flex flex-wrap gap-2">
              <Button
                onClick={() => {
                  handle.startAgain()
                  onReload()
                }}
              >
                Load theirs, drop mine
              </Button>
              <Button kind="danger" onClick={() => void saveOver(formula, handle, onSaved)}>
                Save mine over theirs
              </Button>
            </div>
          }
        />
      ) : (
        <ErrorNote error={refusal} />
      )}
      {!refusal && count > 0 ? (
        <ErrorNote
          error={`${count} ${count === 1 ? 'row' : 'rows'} cannot be saved yet. Each says what is wrong at its place.`}
        />
      ) : null}
      {isKept && isDirty && !refusal ? (
        <p className="border-l-4 border-ink py-0.5 pl-3">
          What you typed before the reload is still here, on this device only.{' '}
          <button type="button" className="font-650 underline underline-offset-4" onClick={handle.startAgain}>
            Drop it and show what is saved
          </button>
        </p>
      ) : null}
    </div>
  )
}

/** On purpose: theirs stays on the trail, mine becomes what stands. */
async function saveOver(formula: FormulaPage, handle: DraftHandle, onSaved: () => void) {
  const answer = await fetch(`/api/formulas/${encodeURIComponent(formula.code)}?version=${formula.number}`)
  const latest = (await answer.json()) as FormulaPage
  if (await handle.save(latest.version)) onSaved()
}
