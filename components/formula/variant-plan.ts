import { formulaTotals } from '@/lib/formula/rules/totals'
import {
  belowZeroSentence,
  gridOf,
  memberLines,
  proposeCodes,
  proposeName,
  readLevels,
  remainderWith,
} from '@/lib/formula/rules/variants'
import { formulaCode, mostVariants } from '@/lib/formula/schema'
import type { FamilyBase } from './variants-form'

/** What is typed: which lines, their levels, and codes and names by the levels they belong to. */
export type TypedFamily = {
  lineIds: [string, string]
  levels: [string, string]
  codes: Record<string, string>
  names: Record<string, string>
}
export const noTyped: TypedFamily = { lineIds: ['', ''], levels: ['', ''], codes: {}, names: {} }

export type FamilyPlan = ReturnType<typeof planFamily>
export type PlannedMember = FamilyPlan['members'][number]

/** The whole family as it would be made, with what stands against it. */
export function planFamily(
  base: FamilyBase,
  typed: TypedFamily,
  taken: readonly string[],
  refused: Record<string, string>,
) {
  const places = ([0, 1] as const).filter((place) => typed.lineIds[place] !== '')
  const lines = places.flatMap((place) => base.lines.find((line) => line.id === typed.lineIds[place]) ?? [])
  const read = places.map((place) => readLevels(typed.levels[place]))
  const errors: [string?, string?] = []
  places.forEach((place, index) => (errors[place] = read[index]?.error ?? undefined))
  for (const place of [0, 1] as const)
    if (typed.lineIds[place] === '' && typed.levels[place].trim() !== '')
      errors[place] = 'Choose the ingredient that takes these levels.'
  const size = read.reduce((all, { levels }) => all * levels.length, places.length ? 1 : 0)
  if (size > mostVariants)
    errors[places.at(-1) ?? 0] =
      `That is a grid of ${size}, and a family has at most ${mostVariants}. Take fewer levels.`
  const grid = errors.some(Boolean) || size === 0 ? [] : gridOf(read.map(({ levels }) => levels))
  const codes = proposeCodes(base.code, grid.length, taken)
  const members = grid.map((shares, index) => {
    const key = shares.join(' ')
    const levels = lines.map((line, at) => ({ inciName: line.inciName, percentThousandths: shares[at] ?? 0 }))
    const own = new Map(lines.map((line, at) => [line.id, shares[at] ?? 0]))
    const code = typed.codes[key] ?? codes[index] ?? ''
    const remainder = remainderWith(base.lines, own) ?? 0
    const error =
      remainder < 0
        ? belowZeroSentence(code || 'This one', remainder)
        : (refused[`members.${index}.code`] ?? refused[`members.${index}.name`] ?? codeError(code))
    return {
      ...{ key, shares, levels, code, remainder, error },
      name: typed.names[key] ?? proposeName(base.name, levels),
      totals: formulaTotals(memberLines(base.lines, own)),
    }
  })
  const wrong = members.filter((member) => member.error).length
  const why = places.length
    ? errors.some(Boolean)
      ? 'The levels cannot be read yet.'
      : members.length === 0
        ? 'Give the levels.'
        : wrong
          ? `${wrong} of them cannot be made. Each says why.`
          : null
    : 'Choose what to vary.'
  return {
    lineIds: lines.map((line) => line.id),
    names: lines.map((line) => line.inciName),
    errors,
    members,
    why,
  }
}

function codeError(code: string): string | undefined {
  const parsed = formulaCode.safeParse(code)
  return parsed.success ? undefined : parsed.error.issues[0]?.message
}
