'use client'

import { createContext, useContext, useState, type ReactNode } from 'react'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import type { CheckKey } from '@/lib/formula/rules/checks/check'
import { ChecksDialog } from './checks-dialog'

const OpenCheck = createContext<((key: CheckKey) => void) | null>(null)

type Props = {
  formula: { code: string; number: number; versionId: string }
  checks: FormulaCheck[]
  mayWrite: boolean
  /** What is on screen is not saved yet, and an answer rests on what is. */
  isDirty: boolean
  onAnswered: () => void
  children: ReactNode
}

/** Lets every question on the page be opened, wherever it stands: beside the drawing or under it. */
export function ChecksRoom({ formula, checks, mayWrite, isDirty, onAnswered, children }: Props) {
  const [key, setKey] = useState<CheckKey | null>(null)
  const check = checks.find((one) => one.key === key)
  return (
    <OpenCheck.Provider value={setKey}>
      {children}
      {check ? (
        <ChecksDialog
          key={check.key}
          formula={formula}
          check={check}
          mayWrite={mayWrite}
          isDirty={isDirty}
          onClose={() => setKey(null)}
          onAnswered={onAnswered}
        />
      ) : null}
    </OpenCheck.Provider>
  )
}

/** The question itself, to press. */
export function CheckTitle({ check }: { check: FormulaCheck }) {
  const open = useContext(OpenCheck)
  if (!open) return <>{check.question}</>
  return (
    <button
      type="button"
      aria-haspopup="dialog"
      onClick={() => open(check.key)}
      className="text-left font-inherit underline decoration-hair decoration-2 underline-offset-4 hover:decoration-ink"
    >
      {check.question}
    </button>
  )
}
