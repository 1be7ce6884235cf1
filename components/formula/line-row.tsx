'use client'

import { memo } from 'react'
import type { IngredientRow } from '@/lib/ingredient/queries'
import { percentText } from '@/lib/formula/rules/numbers'
import type { LineErrors, TypedLine } from '@/lib/formula/rules/typed'
import { Cell } from './cell'
import { InciCell } from './inci-cell'
import { RowActs } from './row-acts'
import type { Drop, StartDrag } from './use-row-drag'

/** What a row asks of its sheet; the same functions at every keystroke, so that only the row typed in is drawn anew. */
export type LineActs = {
  change: (id: string, next: Partial<TypedLine>, column: string) => void
  pick: (id: string, ingredient: IngredientRow) => void
  add: (line: TypedLine) => void
  markPhase: (phase: string, isInternal: boolean) => void
  move: (id: string, by: -1 | 1) => void
  remove: (id: string) => void
  grip: StartDrag
}

type Props = {
  line: TypedLine
  errors: LineErrors | undefined
  /** What the "q.s. to 100" line comes to; null for every other. */
  remainder: number | null
  /** The share in the version before, where it was another; "none" for a line that is new. */
  was: string | null
  isFirst: boolean
  isLast: boolean
  drop: Drop['side'] | undefined
  acts: LineActs
}

export const LineRow = memo(function LineRow({
  line,
  errors = {},
  remainder,
  was,
  isFirst,
  isLast,
  drop,
  acts,
}: Props) {
  const onChange = (next: Partial<TypedLine>, column: string) => acts.change(line.id, next, column)
  const name = line.inciName.trim() || 'this line'
  const cell = (col: string) => ({ id: `${line.id}-${col}`, 'data-row': line.id, 'data-col': col })
  return (
    <tr
      data-line={line.id}
      data-drop={drop}
      className="group border-b border-hair align-top focus-within:bg-paper data-[drop=after]:shadow-[inset_0_-3px_0_var(--ink)] data-[drop=before]:shadow-[inset_0_3px_0_var(--ink)]"
    >
      <td className="py-0.5">
        <InciCell
          row={line.id}
          label={`INCI name of ${name}, phase ${line.phase}`}
          value={line.inciName}
          isKnown={line.ingredientId !== null}
          error={errors.inciName}
          onText={(inciName) => onChange({ inciName, ingredientId: null }, 'inci')}
          onPick={(ingredient) => acts.pick(line.id, ingredient)}
          onAdd={() => acts.add(line)}
        />
      </td>
      <td className="py-0.5">
        <Cell
          {...cell('function')}
          label={`Function of ${name}`}
          value={line.function}
          error={errors.function}
          list="formula-functions"
          onText={(text) => onChange({ function: text }, 'function')}
          title={line.function.length > 13 ? line.function : undefined}
          className="text-13 text-soft focus:text-ink"
        />
      </td>
      <td className="whitespace-nowrap py-0.5 text-right align-middle text-13">
        {line.isRemainder ? <span className="block leading-none">q.s.</span> : null}
        {was ? (
          <span title={`${was} in the version before`}>
            <svg viewBox="0 0 10 10" width="10" height="10" aria-hidden className="mr-1 inline">
              <circle cx="5" cy="5" r="4" fill="none" stroke="currentColor" strokeWidth="1.5" />
            </svg>
            <span className="sr-only">was </span>
            {was}
          </span>
        ) : null}
      </td>
      <td className="py-0.5">
        <Cell
          {...cell('percent')}
          label={`% w/w of ${name}`}
          inputMode="decimal"
          value={remainder === null ? line.percent : percentText(remainder)}
          error={errors.percent}
          onText={(text) => onChange(typedShare(text), 'percent')}
          className="text-right text-16 font-650"
        />
      </td>
      <td className="py-0.5">
        <Cell
          {...cell('density')}
          label={`Density of ${name} in g/mL`}
          inputMode="decimal"
          value={line.density}
          error={errors.density}
          onText={(density) => onChange({ density }, 'density')}
          className="text-right text-14"
        />
      </td>
      <td className="py-0.5">
        <Cell
          {...cell('price')}
          label={`Price of ${name} per kg`}
          inputMode="decimal"
          value={line.price}
          error={errors.price}
          onText={(price) => onChange({ price }, 'price')}
          className="text-right text-14"
        />
      </td>
      <td className="text-center align-middle">
        <input
          type="checkbox"
          {...cell('inside')}
          aria-label={`${name} is in the internal phase`}
          checked={line.isInternal}
          onChange={(event) => onChange({ isInternal: event.target.checked }, 'inside')}
          className="tick align-middle"
        />
      </td>
      <td className="py-0.5 align-middle">
        <RowActs
          of={name}
          onUp={isFirst ? undefined : () => acts.move(line.id, -1)}
          onDown={isLast ? undefined : () => acts.move(line.id, 1)}
          onRemove={() => acts.remove(line.id)}
          onGrip={(event) => acts.grip(event, line.id)}
        />
      </td>
    </tr>
  )
})

/** "q.s." or "qs" typed as the share makes the line the one that fills up to 100. */
function typedShare(text: string): Partial<TypedLine> {
  if (/^q\.?\s?s\.?$/i.test(text.trim())) return { isRemainder: true, percent: '' }
  return { isRemainder: false, percent: text }
}
