'use client'

import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'

export type PaperTime = { isOn: boolean; at: string }

/** Typing in what was written by hand: the time it was really done is claimed, the server's stands beside it. */
export function PaperSwitch({ paper, onPaper }: { paper: PaperTime; onPaper: (paper: PaperTime) => void }) {
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
      <Checkbox
        label="Typed in from paper"
        checked={paper.isOn}
        onSet={(isOn) => onPaper({ isOn, at: paper.at || localNow() })}
      />
      {paper.isOn ? (
        <Field
          label="Really done at"
          type="datetime-local"
          value={paper.at}
          max={localNow()}
          onText={(at) => onPaper({ ...paper, at })}
        />
      ) : null}
    </div>
  )
}

/** This device's day and minute, as the field wants them. */
export function localNow(): string {
  const now = new Date()
  return new Date(now.getTime() - now.getTimezoneOffset() * 60_000).toISOString().slice(0, 16)
}

export function claimOf(paper: PaperTime): { claimedAt: string; isFromPaper: boolean } {
  const typed = paper.isOn ? new Date(paper.at) : null
  const isFromPaper = typed !== null && !Number.isNaN(typed.getTime())
  return { claimedAt: (isFromPaper ? typed : new Date()).toISOString(), isFromPaper }
}
