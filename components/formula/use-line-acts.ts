'use client'

import { useCallback, useMemo, type RefObject } from 'react'
import { newId } from '@/lib/db/id'
import { emptyLine, grouped, moveLine } from '@/lib/formula/rules/arrange'
import type { EmulsionType } from '@/lib/formula/schema'
import { addToIngredients, filledFrom } from './fill-line'
import type { LineActs } from './line-row'
import type { ChangeLines } from './line-sheet'
import { focusCell } from './sheet-keys'
import type { StartDrag } from './use-row-drag'

type Of = {
  sheet: RefObject<HTMLTableElement | null>
  emulsionType: EmulsionType
  onLines: ChangeLines
  onProblem: (sentence: string) => void
  start: StartDrag
}

/** What can be done to lines. None of it holds the lines themselves, so it stays the same while they change. */
export function useLineActs({ sheet, emulsionType, onLines, onProblem, start }: Of) {
  const addLine = useCallback(
    (phase: string, after?: string) => {
      const id = newId()
      onLines((lines) => {
        const own = lines.filter((line) => line.phase === phase)
        const line = emptyLine(id, phase, (own[0] ?? lines.at(-1))?.isInternal ?? false)
        const index = lines.findIndex((other) => other.id === (after ?? own.at(-1)?.id)) + 1
        return grouped([
          ...lines.slice(0, index || lines.length),
          line,
          ...lines.slice(index || lines.length),
        ])
      })
      focusCell(sheet.current, id, 'inci')
    },
    [sheet, onLines],
  )
  const acts = useMemo<LineActs>(
    () => ({
      change: (id, next, column) =>
        onLines(
          (lines) =>
            lines.map((line) => {
              if (line.id === id) return { ...line, ...next }
              // Only one line fills up to 100.
              return next.isRemainder && line.isRemainder ? { ...line, isRemainder: false } : line
            }),
          `${id} ${column}`,
        ),
      pick: (id, ingredient) => {
        onLines((lines) =>
          lines.map((line) => (line.id === id ? { ...line, ...filledFrom(line, ingredient) } : line)),
        )
        focusCell(sheet.current, id, 'percent')
      },
      add: (line) => {
        void addToIngredients(line, emulsionType).then((answer) => {
          if (typeof answer === 'string') return onProblem(answer)
          onLines((lines) =>
            lines.map((one) => (one.id === line.id ? { ...one, ingredientId: answer.id } : one)),
          )
        })
      },
      markPhase: (phase, isInternal) =>
        onLines((lines) => lines.map((line) => (line.phase === phase ? { ...line, isInternal } : line))),
      move: (id, by) => onLines((lines) => grouped(moveLine(lines, id, by))),
      remove: (id) => {
        const rows = [...(sheet.current?.querySelectorAll<HTMLElement>('[data-line]') ?? [])]
        const index = rows.findIndex((row) => row.dataset['line'] === id)
        const next = (rows[index + 1] ?? rows[index - 1])?.dataset['line']
        onLines((lines) => lines.filter((line) => line.id !== id))
        if (next) focusCell(sheet.current, next, 'inci')
      },
      grip: start,
    }),
    [sheet, emulsionType, onLines, onProblem, start],
  )
  return { acts, addLine }
}
