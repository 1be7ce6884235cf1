import {
  isBlankLine,
  isBlankStep,
  readLine,
  readStep,
  remainderOf,
  type LineErrors,
  type StepErrors,
  type TypedLine,
  type TypedStep,
} from '@/lib/formula/rules/typed'
import { readTargetPh, targetPhColumns } from '@/lib/formula/rules/target-ph'
import type { EmulsionType } from '@/lib/formula/schema'

export type Draft = {
  version: number
  name: string
  emulsionType: EmulsionType
  targetPh: string
  note: string
  lines: TypedLine[]
  steps: TypedStep[]
}

export type Problems = {
  name?: string
  emulsionType?: string
  targetPh?: string
  lines: Record<string, LineErrors>
  steps: Record<string, StepErrors>
}

export const noProblems: Problems = { lines: {}, steps: {} }

/** Blank rows are left out; a row that cannot be read keeps its text and gets its sentence. */
export function readDraft(draft: Draft) {
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
  const ph = readTargetPh(draft.targetPh)
  if ('sentence' in ph) problems.targetPh = ph.sentence
  const isRead = !problems.name && !problems.targetPh
  const isWhole = isRead && lines.length === typedLines.length && steps.length === typedSteps.length
  const { name, emulsionType, note } = draft
  return {
    problems,
    body:
      isWhole && 'target' in ph
        ? { name, emulsionType, ...targetPhColumns(ph.target), note, lines, steps }
        : null,
    tidy: isWhole ? { lines: typedLines, steps: typedSteps } : null,
  }
}

/** Field paths of a refusal ("lines.3.density") to the rows that they name. */
export function fromFields(fields: Record<string, string>, draft: Draft): Problems {
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
    else if (part === 'targetPhLow' || part === 'targetPhHigh') problems.targetPh = sentence
    else if (row && part === 'lines')
      problems.lines[row.id] = { ...problems.lines[row.id], [field]: sentence }
    else if (row && part === 'steps')
      problems.steps[row.id] = { ...problems.steps[row.id], [field]: sentence }
  }
  return problems
}
