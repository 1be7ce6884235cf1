'use client'

import type { IngredientRow } from '@/lib/ingredient/queries'
import { percentText } from '@/lib/formula/rules/numbers'
import type { LineErrors, TypedLine } from '@/lib/formula/rules/typed'
import { Cell } from './cell'
import { InciCell } from './inci-cell'
import { RowActs } from './row-acts'

type Props = {
  line: TypedLine
  errors: LineErrors
  /** What the "q.s. to 100" line comes to. */
  remainder: number
  /** The share in the version before, where it was another; "none" for a line that is new. */
  was: string | null
  onChange: (change: Partial<TypedLine>) => void
  onPick: (ingredient: IngredientRow) => void
  onAdd: () => void
  onUp?: () => void
  onDown?: () => void
  onRemove: () => void
}

export function LineRow({ line, errors, remainder, was, onChange, onPick, onAdd, ...acts }: Props) {
  const name = line.inciName.trim() || 'this line'
  const cell = (col: string) => ({ id: `${line.id}-${col}`, 'data-row': line.id, 'data-col': col })
  return (
    <tr className="group border-b border-hair align-top focus-within:bg-paper" data-line={line.id}>
      <td className="py-0.5">
        <InciCell
          row={line.id}
          label={`INCI name of ${name}, phase ${line.phase}`}
          value={line.inciName}
          isKnown={line.ingredientId !== null}
          error={errors.inciName}
          onText={(inciName) => onChange({ inciName, ingredientId: null })}
          onPick={onPick}
          onAdd={onAdd}
        />
      </td>
      <td className="py-0.5">
        <Cell
          {...cell('function')}
          label={`Function of ${name}`}
          value={line.function}
          error={errors.function}
          list="formula-functions"
          onText={(text) => onChange({ function: text })}
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
          value={line.isRemainder ? percentText(remainder) : line.percent}
          error={errors.percent}
          onText={(text) => onChange(typedShare(text))}
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
          onText={(density) => onChange({ density })}
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
          onText={(price) => onChange({ price })}
          className="text-right text-14"
        />
      </td>
      <td className="text-center align-middle">
        <input
          type="checkbox"
          {...cell('inside')}
          aria-label={`${name} is in the internal phase`}
          checked={line.isInternal}
          onChange={(event) => onChange({ isInternal: event.target.checked })}
          className="tick align-middle"
        />
      </td>
      <td className="py-0.5 align-middle">
        <RowActs of={name} {...acts} />
      </td>
    </tr>
  )
}

/** "q.s." or "qs" typed as the share makes the line the one that fills up to 100. */
function typedShare(text: string): Partial<TypedLine> {
  if (/^q\.?\s?s\.?$/i.test(text.trim())) return { isRemainder: true, percent: '' }
  return { isRemainder: false, percent: text }
}
