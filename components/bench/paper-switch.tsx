'use client'

import { useKept } from '@/components/device/use-kept'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'

const nothing = { isOn: false, at: '' }

/** The time that stands on the paper, for this jar and the next ones, until it is switched off; null while it is. */
export function usePaper() {
  const [paper, setPaper] = useKept('paper', nothing)
  const time = Date.parse(paper.at)
  return {
    ...paper,
    setPaper,
    /** Null while entries are made at the jar. */
    paperAt: paper.isOn && Number.isFinite(time) ? new Date(time).toISOString() : null,
    why: paper.isOn && !Number.isFinite(time) ? 'Type when it was really measured.' : undefined,
  }
}

type Props = { paper: ReturnType<typeof usePaper> }

export function PaperButton({ paper }: Props) {
  return paper.isOn ? null : (
    <button
      type="button"
      className="min-h-16 px-1 text-17 underline underline-offset-4"
      onClick={() => paper.setPaper({ isOn: true })}
    >
      From paper
    </button>
  )
}

/** Readings typed in from a paper form stand at the time when they were really taken; the server keeps its own too. */
export function PaperTime({ paper: { isOn, at, setPaper, why } }: Props) {
  if (!isOn) return null
  return (
    <div className="mx-4 mt-3 flex flex-wrap items-end gap-3 border-l-[5px] border-ink pl-3 sm:mx-7">
      <Field
        label="From paper: really measured at"
        density="bench"
        type="datetime-local"
        value={at}
        onText={(text) => setPaper({ at: text })}
        hint="For this jar and the next ones, until it is switched off."
        {...(why ? { error: why } : {})}
      />
      <Button density="bench" onClick={() => setPaper({ isOn: false, at: '' })}>
        No longer from paper
      </Button>
    </div>
  )
}
