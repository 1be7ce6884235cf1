'use client'

import type { ClipboardEvent, RefObject } from 'react'
import { toast } from '@/components/ui/toast'
import { fillNumbers, grouped } from '@/lib/formula/rules/arrange'
import { readPasted, type PastedLine } from '@/lib/formula/rules/paste'
import { isBlankLine, type TypedLine } from '@/lib/formula/rules/typed'
import { mostLines } from '@/lib/formula/schema'
import { fetcher } from '@/lib/http/fetcher'
import type { IngredientRow } from '@/lib/ingredient/queries'
import { findNamed } from '@/lib/ingredient/rules'
import { listed } from '@/lib/study/rules/words'
import { linesFromPaste } from './fill-line'
import type { ChangeLines } from './line-sheet'
import { focusCell } from './sheet-keys'

type Of = {
  sheet: RefObject<HTMLTableElement | null>
  lines: TypedLine[]
  onLines: ChangeLines
  onProblem: (sentence: string) => void
  /** What became of the names in the block, one sentence each. */
  onTold: (sentences: string[]) => void
}

/** A pasted block becomes lines below the one that has the focus, or numbers in the cells from there on. */
export function usePaste({ sheet, lines, onLines, onProblem, onTold }: Of) {
  return async (event: ClipboardEvent<HTMLTableElement>) => {
    const pasted = readPasted(event.clipboardData.getData('text/plain'))
    if (!pasted) return
    event.preventDefault()
    onProblem('')
    onTold([])
    const field = event.target instanceof HTMLInputElement ? event.target.dataset : {}
    if (pasted.kind === 'refused') return onProblem(pasted.sentence)
    if (pasted.kind === 'numbers') {
      const [row, column] = [field['row'] ?? '', field['col'] ?? '']
      const filled = fillNumbers(lines, row, column, pasted.rows)
      if (typeof filled === 'string') onProblem(filled)
      else onLines(() => filled)
      return
    }
    const isKept = (line: TypedLine) => !isBlankLine(line) || line.isRemainder
    const count = lines.filter(isKept).length + pasted.lines.length
    if (count > mostLines) {
      return onProblem(
        `With these ${pasted.lines.length} there would be ${count} lines, and a formula has at most ${mostLines}. Nothing was changed.`,
      )
    }
    const known = await findKnown(pasted.lines)
    const found = (name: string) => findNamed(known, name)
    const at = lines.find((line) => line.id === field['row'])
    const added = linesFromPaste(pasted.lines, (name) => found(name)?.row ?? null, at, lines)
    onLines((now) => {
      const index = now.findIndex((line) => line.id === at?.id) + 1 || now.length
      return grouped([...now.slice(0, index), ...added, ...now.slice(index)].filter(isKept))
    })
    if (added[0]) focusCell(sheet.current, added[0].id, 'percent')
    toast(`${added.length} ${added.length === 1 ? 'line' : 'lines'} pasted.`)
    onProblem(leftOutSentence(pasted.leftOut))
    onTold(namesTold(pasted.lines, found))
  }
}

function leftOutSentence(leftOut: readonly string[]): string {
  if (!leftOut.length) return ''
  const shown = leftOut.slice(0, 3).map((row) => row.slice(0, 40))
  const more = leftOut.length > shown.length ? ' and more' : ''
  return `${leftOut.length === 1 ? 'One row was' : `${leftOut.length} rows were`} left out, without a name or a share: ${shown.join('; ')}${more}.`
}

/** Names that the book has under another one, and names that it has not. */
function namesTold(
  lines: readonly PastedLine[],
  found: (name: string) => ReturnType<typeof findNamed<IngredientRow>>,
): string[] {
  const names = [...new Set(lines.map((line) => line.inciName))]
  const others = names.flatMap((name) => {
    const { row, match } = found(name) ?? {}
    if (!row || !match) return []
    return `${name} is ${row.inciName}, by ${match.in === 'synonym' ? 'a synonym' : 'the supplier’s own name'} in the book.`
  })
  const unknown = names.filter((name) => !found(name))
  if (!unknown.length) return others
  const isOne = unknown.length === 1
  return [
    ...others,
    `${listed(unknown)} ${isOne ? 'stands' : 'stand'} in the book under no name, or under several: look at ${isOne ? 'its line' : 'their lines'}.`,
  ]
}

/** In several requests, so that the address stays short. */
async function findKnown(lines: readonly PastedLine[]): Promise<IngredientRow[]> {
  const names = [...new Set(lines.map((line) => line.inciName))]
  const parts = Array.from({ length: Math.ceil(names.length / 40) }, (_, part) =>
    names.slice(40 * part, 40 * part + 40),
  )
  const found = await Promise.all(
    parts.map((part) =>
      fetcher<IngredientRow[]>(
        `/api/ingredients/known?${new URLSearchParams(part.map((name) => ['name', name]))}`,
      ).catch(() => []),
    ),
  )
  return found.flat()
}
