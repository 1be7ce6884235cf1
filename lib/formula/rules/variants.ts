import type { FormulaLine } from '../schema'
import { percentText } from './numbers'
import { readScaled } from '@/lib/number/rules'
import { wholeThousandths } from './totals'

type Line = Pick<FormulaLine, 'id' | 'inciName' | 'percentThousandths' | 'isRemainder'>

export type Level = { phase: string; inciName: string; percentThousandths: number }

/** "0.2; 0,3 0.4" as shares; a sentence where something in it is none. */
export function readLevels(typed: string): { levels: number[]; error: string | null } {
  const parts = typed.split(/[;\s\u2009]+|,(?=\s)/).filter((part) => part !== '' && part !== '%')
  const levels: number[] = []
  for (const part of parts) {
    const share = readScaled(part.replace(/%$/, ''), 3)
    if (share === null || share < 0 || share > wholeThousandths)
      return { levels: [], error: `${part} is no share in %. Type levels such as 0.20; 0.30; 0.40.` }
    if (levels.includes(share)) return { levels: [], error: `${part} stands twice. Each level once.` }
    levels.push(share)
  }
  return { levels, error: null }
}

/** Every level of the first with every level of the second. */
export function gridOf(levels: readonly (readonly number[])[]): number[][] {
  return levels.reduce<number[][]>(
    (grid, own) => grid.flatMap((row) => own.map((share) => [...row, share])),
    [[]],
  )
}

/**
 * What the "q.s. to 100" line has left when lines get other shares: below 0 where they do not fit; null
 * without such a line.
 */
export function remainderWith(lines: readonly Line[], shares: ReadonlyMap<string, number>): number | null {
  if (!lines.some((line) => line.isRemainder)) return null
  return lines
    .filter((line) => !line.isRemainder)
    .reduce((left, line) => left - (shares.get(line.id) ?? line.percentThousandths), wholeThousandths)
}

/** The base's lines with the shares of one member and its q.s. line filled up. */
export function memberLines<L extends Line>(lines: readonly L[], shares: ReadonlyMap<string, number>): L[] {
  const remainder = remainderWith(lines, shares)
  return lines.map((line) => ({
    ...line,
    percentThousandths: line.isRemainder
      ? Math.max(0, remainder ?? line.percentThousandths)
      : (shares.get(line.id) ?? line.percentThousandths),
  }))
}

/** "does not fit: the q.s. line would be 1.20 % below 0". */
export function belowZeroSentence(code: string, remainder: number): string {
  return `${code} does not fit: the q.s. to 100 line would go ${percentText(-remainder)} % below 0. Take lower levels.`
}

export function noRemainderSentence(code: string, number: number): string {
  return `Version ${number} of ${code} has no q.s. to 100 line to balance a family. Type qs as the share of one line, save, then vary.`
}

/** The base's code with a letter behind it, or a digit where the code ends in a letter; none that is taken. */
export function proposeCodes(base: string, count: number, taken: readonly string[]): string[] {
  const used = new Set(taken.map((code) => code.toLowerCase()))
  const codes: string[] = []
  const endsInLetter = /[a-z]$/i.test(base)
  for (let index = 0; codes.length < count && index < 500; index++) {
    const tail = endsInLetter ? String(index + 1) : tailOf(index)
    const code = `${base.slice(0, 20 - tail.length)}${tail}`
    if (!used.has(code.toLowerCase())) codes.push(code)
  }
  return codes
}

/** a … z, then a1 … z1, a2 … */
function tailOf(index: number): string {
  const round = Math.floor(index / 26)
  return `${'abcdefghijklmnopqrstuvwxyz'[index % 26]}${round === 0 ? '' : round}`
}

/** "silicone-free cream, Xanthan Gum 0.30 %". */
export function proposeName(base: string, levels: readonly Omit<Level, 'phase'>[]): string {
  const tail = levelsText(levels)
  const whole = `${base}, ${tail}`
  return whole.length <= 120
    ? whole
    : `${base.slice(0, Math.max(0, 118 - tail.length))}, ${tail}`.slice(0, 120)
}

export function levelsText(levels: readonly Omit<Level, 'phase'>[]): string {
  return levels
    .map(({ inciName, percentThousandths }) => `${inciName} ${percentText(percentThousandths)} %`)
    .join(', ')
}

export type FamilyMember = { code: string; levels: Level[] }
export type FamilyGrid = {
  rowName: string
  columnName: string | null
  columns: (number | null)[]
  rows: { level: number; codes: string[][] }[]
}

/** The first varied ingredient down, the second one across; a place holds the codes that stand there. */
export function familyGrid(members: readonly FamilyMember[]): FamilyGrid | null {
  const first = members.find((member) => member.levels.length > 0)
  if (!first) return null
  const shares = (at: number) =>
    [...new Set(members.flatMap((member) => member.levels[at]?.percentThousandths ?? []))].sort(
      (a, b) => a - b,
    )
  const columns: (number | null)[] = shares(1).length ? shares(1) : [null]
  return {
    rowName: first.levels[0]!.inciName,
    columnName: first.levels[1]?.inciName ?? null,
    columns,
    rows: shares(0).map((level) => ({
      level,
      codes: columns.map((column) =>
        members
          .filter(
            ({ levels }) =>
              levels[0]?.percentThousandths === level && (levels[1]?.percentThousandths ?? null) === column,
          )
          .map((member) => member.code),
      ),
    })),
  }
}
