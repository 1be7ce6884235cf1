'use client'

import { useCallback, useEffect, useMemo, useState } from 'react'
import type { Drafts } from '@/components/device/drafts'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { begin, record, redo, undo, type History } from '@/lib/formula/rules/history'
import { targetPhOf, targetPhText } from '@/lib/formula/rules/target-ph'
import { readAmounts, typeLine, typeStep, type TypedLine, type TypedStep } from '@/lib/formula/rules/typed'
import { fromFields, noProblems, readDraft, type Draft } from './read-draft'

const keyOf = (versionId: string) => `formula.${versionId}`

/** Whether this person typed here before a reload; only the device knows. */
export function hasKeptDraft(versionId: string, drafts: Drafts): boolean {
  return readKept(drafts.find(keyOf(versionId))) !== null
}

/** What changes a draft; `at` names the field, so that typing on in it is one step to take back. */
export type ChangeDraft = (change: (draft: Draft) => Partial<Draft>, at?: string | null) => void

/** The draft on screen: what the server has, or what this person typed here before a reload. */
export function useDraft(formula: FormulaPage, drafts: Drafts | null) {
  const key = keyOf(formula.versionId)
  const server = useMemo(() => draftOf(formula), [formula])
  const [kept] = useState(() => (drafts && formula.state === 'draft' ? readKept(drafts.find(key)) : null))
  const [base, setBase] = useState(server)
  const [history, setHistory] = useState<History<Draft>>(() => begin(kept ?? server))
  const [problems, setProblems] = useState(noProblems)
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSaving, setIsSaving] = useState(false)
  const draft = history.now
  const baseText = useMemo(() => textOf(base), [base])
  const isDirty = useMemo(() => textOf(draft) !== baseText, [draft, baseText])

  useEffect(() => {
    if (!drafts || formula.state !== 'draft') return
    if (isDirty || drafts.find(key) !== undefined) drafts.change(key, () => (isDirty ? draft : undefined))
  }, [drafts, isDirty, draft, key, formula.state])

  const change: ChangeDraft = useCallback((next, at = null) => {
    setHistory((was) => {
      const changed = next(was.now)
      return isNothing(was.now, changed) ? was : record(was, { ...was.now, ...changed }, at)
    })
  }, [])
  const takeBack = useCallback(() => setHistory((was) => atVersionOf(was, undo(was))), [])
  const doAgain = useCallback(() => setHistory((was) => atVersionOf(was, redo(was))), [])

  function startAgain() {
    setBase(server)
    setHistory((was) => record(was, server, null))
    setProblems(noProblems)
    setRefusal(null)
  }

  async function save(over?: number): Promise<boolean> {
    const read = readDraft(draft)
    setProblems(read.problems)
    setRefusal(null)
    if (!read.body) return false
    setIsSaving(true)
    const version = over ?? draft.version
    try {
      const url = `/api/formulas/${encodeURIComponent(formula.code)}`
      const body = { ...read.body, versionId: formula.versionId, version }
      const saved = await send<{ version: number }>(url, 'PUT', body, { key: newId() })
      const now = { ...draft, version: saved.version, ...(read.tidy ?? {}) }
      setBase(now)
      // What was typed while it was on its way stays, and is not saved yet.
      setHistory((was) => ({ ...was, now: was.now === draft ? now : { ...was.now, version: saved.version } }))
      return true
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
      setProblems(fromFields(thrown.fields, draft))
      return false
    } finally {
      setIsSaving(false)
    }
  }

  const isKept = kept !== null && textOf(kept) !== textOf(server) && isDirty
  const amounts = useMemo(() => readAmounts(draft.lines), [draft.lines])
  return {
    ...{ draft, change, amounts, isDirty, isKept, problems, refusal, isSaving, save, startAgain },
    undo: { canUndo: history.past.length > 0, canRedo: history.future.length > 0, takeBack, doAgain },
  }
}

export type DraftHandle = ReturnType<typeof useDraft>

function draftOf(formula: FormulaPage): Draft {
  const { version, name, emulsionType, note } = formula
  const lines = formula.lines.map(typeLine)
  const targetPh = targetPhText(targetPhOf(formula))
  return { version, name, emulsionType, targetPh, note, lines, steps: formula.steps.map(typeStep) }
}

/** What counts as changed; the version is not a person's doing. */
function textOf({ name, emulsionType, targetPh, note, lines, steps }: Draft): string {
  return JSON.stringify([name, emulsionType, targetPh, note, lines, steps].flat().map((part) => normal(part)))
}

function normal(part: string | TypedLine | TypedStep): unknown {
  if (typeof part === 'string') return part
  return Object.entries(part).toSorted(([a], [b]) => (a < b ? -1 : 1))
}

function readKept(found: unknown): Draft | null {
  const kept = found as Draft | null | undefined
  if (!kept || !Array.isArray(kept.lines) || !Array.isArray(kept.steps)) return null
  // One that was kept before there was a target pH, or what to look for in a step, has none.
  const steps = kept.steps.map((step) => ({ ...step, lookFor: step.lookFor ?? '' }))
  return { ...kept, targetPh: kept.targetPh ?? '', steps }
}

/** The version is the server's; taking a change back does not take a save back. */
function atVersionOf(was: History<Draft>, next: History<Draft>): History<Draft> {
  if (next.now === was.now) return next
  return { ...next, now: { ...next.now, version: was.now.version } }
}

/** Rows that were put where they stand already. */
function isNothing(now: Draft, changed: Partial<Draft>): boolean {
  return Object.entries(changed).every(([key, value]) => {
    const old = now[key as keyof Draft]
    if (!Array.isArray(value) || !Array.isArray(old)) return value === old
    return value.length === old.length && value.every((row, index) => row === old[index])
  })
}
