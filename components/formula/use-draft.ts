'use client'

import { useEffect, useMemo, useState } from 'react'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import {
  isBlankLine,
  isBlankStep,
  readAmounts,
  readLine,
  readStep,
  remainderOf,
  typeLine,
  typeStep,
  type LineErrors,
  type StepErrors,
  type TypedLine,
  type TypedStep,
} from '@/lib/formula/rules/typed'
import type { EmulsionType } from '@/lib/formula/schema'

export type Draft = {
  version: number
  name: string
  emulsionType: EmulsionType
  note: string
  lines: TypedLine[]
  steps: TypedStep[]
}

export type Problems = {
  name?: string
  emulsionType?: string
  lines: Record<string, LineErrors>
  steps: Record<string, StepErrors>
}

const noProblems: Problems = { lines: {}, steps: {} }

const placeOf = (versionId: string, personId: string) => `stillstand:formula:${personId}:${versionId}`

/** Whether this person typed here before a reload; only the browser knows. */
export function hasKeptDraft(versionId: string, personId: string): boolean {
  return readKept(placeOf(versionId, personId)) !== null
}

/** The draft on screen: what the server has, or what this person typed here before a reload. */
export function useDraft(formula: FormulaPage, personId: string, isClient: boolean) {
  const place = placeOf(formula.versionId, personId)
  const server = useMemo(() => draftOf(formula), [formula])
  const [kept] = useState(() => (isClient && formula.state === 'draft' ? readKept(place) : null))
  const [base, setBase] = useState(server)
  const [draft, setDraft] = useState<Draft>(kept ?? server)
  const [problems, setProblems] = useState(noProblems)
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSaving, setIsSaving] = useState(false)
  const isDirty = useMemo(() => textOf(draft) !== textOf(base), [draft, base])

  useEffect(() => {
    if (!isClient || formula.state !== 'draft') return
    if (isDirty) localStorage.setItem(place, JSON.stringify(draft))
    else localStorage.removeItem(place)
  }, [isClient, isDirty, draft, place, formula.state])

  function change(next: Partial<Draft>) {
    setDraft((now) => ({ ...now, ...next }))
  }

  function startAgain() {
    setBase(server)
    setDraft(server)
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
      setDraft(now)
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
  return { draft, change, amounts, isDirty, isKept, problems, refusal, isSaving, save, startAgain }
}

export type DraftHandle = ReturnType<typeof useDraft>

function draftOf(formula: FormulaPage): Draft {
  const { version, name, emulsionType, note } = formula
  const lines = formula.lines.map(typeLine)
  return { version, name, emulsionType, note, lines, steps: formula.steps.map(typeStep) }
}

/** What counts as changed; the version is not a person's doing. */
function textOf({ name, emulsionType, note, lines, steps }: Draft): string {
  return JSON.stringify([name, emulsionType, note, lines, steps].flat().map((part) => normal(part)))
}

function normal(part: string | TypedLine | TypedStep): unknown {
  if (typeof part === 'string') return part
  return Object.entries(part).toSorted(([a], [b]) => (a < b ? -1 : 1))
}

function readKept(place: string): Draft | null {
  try {
    const kept = JSON.parse(localStorage.getItem(place) ?? 'null') as Draft | null
    return kept && Array.isArray(kept.lines) && Array.isArray(kept.steps) ? kept : null
  } catch {
    return null
  }
}

/** Blank rows are left out; a row that cannot be read keeps its text and gets its sentence. */
function readDraft(draft: Draft) {
  const problems: Problems = { lines: {}, steps: {} }
  if (!draft.name.trim()) problems.name = 'Give the formula a name, such as silicone-free cream.'
  const typedLines = draft.lines.filter((line) => !isBlankLine(line) || line.isRemainder)
  const typedSteps = draft.steps.filter((step) => !isBlankStep(step))
  const remainder = remainderOf(typedLines)
  const lines = typedLines.flatMap((typed) => {
    const { line, errors } = readLine(typed, remainder)
    if (!line) problems.lines[typed.id] = errors
    return line ?? []
  })
  const steps = typedSteps.flatMap((typed) => {
    const { step, errors } = readStep(typed)
    if (!step) problems.steps[typed.id] = errors
    return step ?? []
  })
  const isWhole = !problems.name && lines.length === typedLines.length && steps.length === typedSteps.length
  const { name, emulsionType, note } = draft
  return {
    problems,
    body: isWhole ? { name, emulsionType, note, lines, steps } : null,
    tidy: isWhole ? { lines: typedLines, steps: typedSteps } : null,
  }
}

/** Field paths of a refusal ("lines.3.density") to the rows that they name. */
function fromFields(fields: Record<string, string>, draft: Draft): Problems {
  const problems: Problems = { lines: {}, steps: {} }
  const names: Record<string, string> = {
    ...{ percentThousandths: 'percent', priceCentsPerKg: 'price' },
    ...{ speedRpm: 'speed', temperatureC: 'temperature' },
  }
  const lines = draft.lines.filter((line) => !isBlankLine(line) || line.isRemainder)
  const steps = draft.steps.filter((step) => !isBlankStep(step))
  for (const [path, sentence] of Object.entries(fields)) {
    const [part, index, name = ''] = path.split('.')
    const rows = part === 'lines' ? lines : part === 'steps' ? steps : null
    const row = rows?.[Number(index)]
    const field = names[name] ?? name
    if (part === 'name' || part === 'emulsionType') problems[part] = sentence
    else if (row && part === 'lines')
      problems.lines[row.id] = { ...problems.lines[row.id], [field]: sentence }
    else if (row && part === 'steps')
      problems.steps[row.id] = { ...problems.steps[row.id], [field]: sentence }
  }
  return problems
}
