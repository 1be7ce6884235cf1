'use client'

import { useCallback, useRef, type KeyboardEvent } from 'react'
import { grouped, nextPhase, phasesOf, placeLine } from '@/lib/formula/rules/arrange'
import { remainderOf, type TypedLine } from '@/lib/formula/rules/typed'
import type { PhaseTotal } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import type { FigureFacts } from '@/lib/science/methods/method'
import { Button } from '@/components/ui/button'
import { LineRow } from './line-row'
import { PhaseRow } from './phase-row'
import type { Problems } from './read-draft'
import { focusCell, walkSheet } from './sheet-keys'
import { UndoButtons } from './undo-buttons'
import type { DraftHandle } from './use-draft'
import { useLineActs } from './use-line-acts'
import { usePaste } from './use-paste'
import { useRowDrag } from './use-row-drag'

export type ChangeLines = (next: (lines: TypedLine[]) => TypedLine[], at?: string) => void

type Props = {
  lines: TypedLine[]
  emulsionType: EmulsionType
  phases: PhaseTotal[]
  factsOfPhase: (total: PhaseTotal) => FigureFacts
  problems: Problems
  /** Share in the version before by INCI name; null without one. */
  before: Map<string, string> | null
  onLines: ChangeLines
  onProblem: (sentence: string) => void
  onTold: (sentences: string[]) => void
  undo: DraftHandle['undo']
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
  onTold,
  undo,
  foot,
}: Props) {
  const sheet = useRef<HTMLTableElement>(null)
  const remainder = remainderOf(lines)
  const onDrop = useCallback(
    (id: string, besideId: string, side: 'before' | 'after') =>
      onLines((now) => grouped(placeLine(now, id, besideId, side))),
    [onLines],
  )
  const { drop, start } = useRowDrag(sheet, onDrop)
  const { acts, addLine } = useLineActs({ sheet, emulsionType, onLines, onProblem, start })
  const paste = usePaste({ sheet, lines, onLines, onProblem, onTold })

  function press(event: KeyboardEvent<HTMLTableElement>) {
    const field = event.target instanceof HTMLInputElement ? event.target : null
    const line = lines.find((one) => one.id === field?.dataset['row'])
    if (!line) return
    if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) {
      event.preventDefault()
      acts.move(line.id, event.key === 'ArrowUp' ? -1 : 1)
      focusCell(sheet.current, line.id, field?.dataset['col'] ?? 'inci')
    } else if (event.altKey && (event.key === 'Delete' || event.key === 'Backspace')) {
      event.preventDefault()
      acts.remove(line.id)
    } else if (walkSheet(event) === 'past the end') addLine(line.phase, line.id)
  }

  return (
    <div>
      {/* overflow-x-auto clips the list of found ingredients, so only narrow screens scroll the sheet. */}
      <div className="relative overflow-x-auto pb-2 lg:overflow-visible">
        <table
          ref={sheet}
          onKeyDown={press}
          onPaste={(event) => void paste(event)}
          className="w-full min-w-[620px] table-fixed border-collapse text-15"
        >
          <caption className="sr-only">Lines of the formula</caption>
          <colgroup>
            <col />
            {columnWidths(before !== null).map((width, index) => (
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
                writing={{
                  inside: insideOf(lines.filter((line) => line.phase === phase)),
                  onInside: (isInternal) => acts.markPhase(phase, isInternal),
                  onAdd: () => addLine(phase),
                }}
              />
              {lines
                .filter((line) => line.phase === phase)
                .map((line) => (
                  <LineRow
                    key={line.id}
                    line={line}
                    errors={problems.lines[line.id]}
                    remainder={line.isRemainder ? remainder : null}
                    was={wasShare(line, remainder, before)}
                    isFirst={lines[0] === line}
                    isLast={lines.at(-1) === line}
                    drop={drop?.besideId === line.id ? drop.side : undefined}
                    acts={acts}
                  />
                ))}
            </tbody>
          ))}
          {foot}
        </table>
      </div>
      <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button onClick={() => addLine(nextPhase(lines))}>Add phase {nextPhase(lines)}</Button>
        <UndoButtons undo={undo} />
        <p className="text-13 text-soft">
          Paste a block from a spreadsheet into any field. Type qs as a share to fill up to 100. Alt with up
          or down moves a line, Alt with Delete removes it, Ctrl Z takes back.
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

function insideOf(lines: TypedLine[]): 'all' | 'some' | 'none' {
  const inside = lines.filter((line) => line.isInternal).length
  return inside === 0 ? 'none' : inside === lines.length ? 'all' : 'some'
}

/** After the INCI name: function, was, % w/w, g/mL, per kg, in, acts. */
const columnWidths = (hasBefore: boolean) => [112, hasBefore ? 58 : 28, 64, 54, 56, 26, 84]

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
