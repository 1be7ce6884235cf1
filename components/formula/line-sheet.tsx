'use client'

import { useRef, type ClipboardEvent, type KeyboardEvent } from 'react'
import { newId } from '@/lib/db/id'
import { fetcher } from '@/lib/http/fetcher'
import { emptyLine, grouped, moveLine, nextPhase, phasesOf } from '@/lib/formula/rules/arrange'
import { readPastedLines } from '@/lib/formula/rules/paste'
import { isBlankLine, remainderOf, type TypedLine } from '@/lib/formula/rules/typed'
import type { PhaseTotal } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import type { FigureFacts } from '@/lib/science/methods/method'
import type { IngredientRow } from '@/lib/ingredient/queries'
import { Button } from '@/components/ui/button'
import { addToIngredients, filledFrom, linesFromPaste } from './fill-line'
import { LineRow } from './line-row'
import { PhaseRow } from './phase-row'
import { focusCell, walkSheet } from './sheet-keys'
import type { Problems } from './use-draft'

type Props = {
  lines: TypedLine[]
  emulsionType: EmulsionType
  phases: PhaseTotal[]
  factsOfPhase: (total: PhaseTotal) => FigureFacts
  problems: Problems
  /** Share in the version before by INCI name; null without one. */
  before: Map<string, string> | null
  onLines: (lines: TypedLine[]) => void
  onProblem: (sentence: string) => void
  foot: React.ReactNode
}

/** The lines of a formula as a sheet to type in: Tab, Enter and arrows walk it, a block can be pasted into it. */
export function LineSheet({
  lines,
  emulsionType,
  phases,
  factsOfPhase,
  problems,
  before,
  onLines,
  onProblem,
  foot,
}: Props) {
  const sheet = useRef<HTMLTableElement>(null)
  const remainder = remainderOf(lines)
  const change = (id: string, next: Partial<TypedLine>) =>
    onLines(
      lines.map((line) => {
        if (line.id === id) return { ...line, ...next }
        // Only one line fills up to 100.
        return next.isRemainder && line.isRemainder ? { ...line, isRemainder: false } : line
      }),
    )

  function addLine(phase: string, after?: string) {
    const own = lines.filter((line) => line.phase === phase)
    const isInternal = (own[0] ?? lines.at(-1))?.isInternal ?? false
    const line = emptyLine(newId(), phase, isInternal)
    const index = lines.findIndex((other) => other.id === (after ?? own.at(-1)?.id))
    onLines(
      grouped([
        ...lines.slice(0, index + 1 || lines.length),
        line,
        ...lines.slice(index + 1 || lines.length),
      ]),
    )
    focusCell(sheet.current, line.id, 'inci')
  }

  function removeLine(id: string) {
    const index = lines.findIndex((line) => line.id === id)
    const next = lines[index + 1] ?? lines[index - 1]
    onLines(lines.filter((line) => line.id !== id))
    if (next) focusCell(sheet.current, next.id, 'inci')
  }

  function press(event: KeyboardEvent<HTMLTableElement>) {
    const row = event.target instanceof HTMLInputElement ? event.target.dataset.row : undefined
    const line = lines.find((one) => one.id === row)
    if (!line) return
    if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) {
      event.preventDefault()
      onLines(grouped(moveLine(lines, line.id, event.key === 'ArrowUp' ? -1 : 1)))
      focusCell(sheet.current, line.id, (event.target as HTMLElement).dataset.col ?? 'inci')
    } else if (event.altKey && (event.key === 'Delete' || event.key === 'Backspace')) {
      event.preventDefault()
      removeLine(line.id)
    } else if (walkSheet(event) === 'past the end') addLine(line.phase, line.id)
  }

  async function paste(event: ClipboardEvent<HTMLTableElement>) {
    const pasted = readPastedLines(event.clipboardData.getData('text/plain'))
    if (!pasted) return
    event.preventDefault()
    const row = event.target instanceof HTMLInputElement ? event.target.dataset.row : undefined
    const at = lines.find((line) => line.id === row)
    const query = new URLSearchParams(pasted.map((line) => ['name', line.inciName]))
    const known = await fetcher<IngredientRow[]>(`/api/ingredients/known?${query}`).catch(() => [])
    const added = linesFromPaste(pasted, known, at, lines)
    const index = at ? lines.indexOf(at) + 1 : lines.length
    const kept = [...lines.slice(0, index), ...added, ...lines.slice(index)].filter(
      (line) => !isBlankLine(line) || line.isRemainder,
    )
    onLines(grouped(kept))
    if (added[0]) focusCell(sheet.current, added[0].id, 'percent')
  }

  async function add(line: TypedLine) {
    const answer = await addToIngredients(line, emulsionType)
    if (typeof answer === 'string') onProblem(answer)
    else change(line.id, { ingredientId: answer.id })
  }

  return (
    <div>
      {/* overflow-x-auto clips the list of found ingredients, so only narrow screens scroll the sheet. */}
      <div className="overflow-x-auto pb-2 lg:overflow-visible">
        <table
          ref={sheet}
          onKeyDown={press}
          onPaste={(event) => void paste(event)}
          className="w-full min-w-[620px] table-fixed border-collapse text-15"
        >
          <caption className="sr-only">Lines of the formula</caption>
          <colgroup>
            <col />
            {columnWidths.map((width, index) => (
              <col key={index} style={{ width }} />
            ))}
          </colgroup>
          <thead>
            <tr className="text-13 text-soft [&_th]:px-1.5 [&_th]:pb-1.5 [&_th]:font-430">
              <th scope="col" className="text-left">
                INCI name
              </th>
              <th scope="col" className="text-left">
                function
              </th>
              <th scope="col" className="text-right">
                {before ? 'was' : <span className="sr-only">was</span>}
              </th>
              <th scope="col" className="text-right">
                % w/w
              </th>
              <th scope="col" className="text-right">
                g/mL
              </th>
              <th scope="col" className="text-right">
                per kg
              </th>
              <th scope="col" className="text-center">
                in
              </th>
              <th scope="col">
                <span className="sr-only">acts</span>
              </th>
            </tr>
          </thead>
          {phasesOf(lines).map((phase) => (
            <tbody key={phase}>
              <PhaseRow
                phase={phase}
                total={phases.find((one) => one.phase === phase)}
                isInternal={lines.some((line) => line.phase === phase && line.isInternal)}
                emulsionType={emulsionType}
                factsOfPhase={factsOfPhase}
                onAdd={() => addLine(phase)}
              />
              {lines
                .filter((line) => line.phase === phase)
                .map((line) => (
                  <LineRow
                    key={line.id}
                    line={line}
                    errors={problems.lines[line.id] ?? {}}
                    remainder={remainder}
                    was={wasShare(line, remainder, before)}
                    onChange={(next) => change(line.id, next)}
                    onPick={(ingredient) => {
                      change(line.id, filledFrom(line, ingredient))
                      focusCell(sheet.current, line.id, 'percent')
                    }}
                    onAdd={() => void add(line)}
                    onUp={
                      lines[0] === line ? undefined : () => onLines(grouped(moveLine(lines, line.id, -1)))
                    }
                    onDown={
                      lines.at(-1) === line ? undefined : () => onLines(grouped(moveLine(lines, line.id, 1)))
                    }
                    onRemove={() => removeLine(line.id)}
                  />
                ))}
            </tbody>
          ))}
          {foot}
        </table>
      </div>
      <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button onClick={() => addLine(nextPhase(lines))}>Add phase {nextPhase(lines)}</Button>
        <p className="text-13 text-soft">
          Paste a block from a spreadsheet into any field. Type qs as a share to fill up to 100. Alt with up
          or down moves a line, Alt with Delete removes it.
        </p>
      </div>
      <datalist id="formula-functions">
        {functions.map((one) => (
          <option key={one} value={one} />
        ))}
      </datalist>
    </div>
  )
}

/** After the INCI name: function, was, % w/w, g/mL, per kg, in, acts. */
const columnWidths = [110, 58, 64, 54, 56, 30, 74]

function wasShare(line: TypedLine, remainder: number, before: Map<string, string> | null): string | null {
  if (!before || !line.inciName.trim()) return null
  const was = before.get(line.inciName.trim().toLowerCase())
  if (was === undefined) return 'none'
  const now = line.isRemainder ? (remainder / 1000).toFixed(2) : line.percent.replace(',', '.')
  return Number(was) === Number(now) ? null : was
}

/** The words that the questions to a formula look for, offered while typing. */
const functions = [
  'polymeric emulsifier',
  'emulsifier',
  'oil',
  'light oil',
  'silicone',
  'thickens the oil',
  'water',
  'humectant',
  'electrolyte',
  'gels the water',
  'preservative',
  'antioxidant',
  'fragrance',
  'acid or base',
]
