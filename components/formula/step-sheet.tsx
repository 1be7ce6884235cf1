'use client'

import { useCallback, useRef, type KeyboardEvent } from 'react'
import { newId } from '@/lib/db/id'
import { moveRow, placeRow } from '@/lib/formula/rules/arrange'
import type { TypedStep } from '@/lib/formula/rules/typed'
import { Button } from '@/components/ui/button'
import { Cell } from './cell'
import { RowActs } from './row-acts'
import { focusCell, walkSheet } from './sheet-keys'
import type { Problems } from './read-draft'
import { TakeSteps } from './take-steps'
import { UndoButtons } from './undo-buttons'
import type { DraftHandle } from './use-draft'
import { useRowDrag } from './use-row-drag'

export type ChangeSteps = (next: (steps: TypedStep[]) => TypedStep[], at?: string) => void

type Props = {
  /** Of the formula whose steps these are. */
  code: string
  steps: TypedStep[]
  problems: Problems
  onSteps: ChangeSteps
  undo: DraftHandle['undo']
}

const columns = [
  { key: 'phase', title: 'phase', width: 92, align: '' },
  { key: 'instruction', title: 'what is done', width: undefined, align: '' },
  { key: 'speed', title: 'rpm', width: 70, align: 'text-right' },
  { key: 'minutes', title: 'min', width: 64, align: 'text-right' },
  { key: 'temperature', title: '°C', width: 64, align: 'text-right' },
  { key: 'lookFor', title: 'what to look for', width: 190, align: '' },
  { key: 'caution', title: 'caution', width: 170, align: '' },
] as const

/** The process in order. "B into A" as the phase names the step that joins them. */
export function StepSheet({ code, steps, problems, onSteps, undo }: Props) {
  const sheet = useRef<HTMLTableElement>(null)
  const onDrop = useCallback(
    (id: string, besideId: string, side: 'before' | 'after') =>
      onSteps((now) => placeRow(now, id, besideId, side)),
    [onSteps],
  )
  const { drop, start } = useRowDrag(sheet, onDrop)

  function addStep(after?: string) {
    const step = {
      id: newId(),
      phase: '',
      instruction: '',
      speed: '',
      minutes: '',
      temperature: '',
      lookFor: '',
      caution: '',
    }
    onSteps((now) => {
      const index = after ? now.findIndex((one) => one.id === after) + 1 : now.length
      return [...now.slice(0, index), step, ...now.slice(index)]
    })
    focusCell(sheet.current, step.id, 'phase')
  }

  function remove(id: string) {
    const index = steps.findIndex((step) => step.id === id)
    const next = steps[index + 1] ?? steps[index - 1]
    onSteps((now) => now.filter((step) => step.id !== id))
    if (next) focusCell(sheet.current, next.id, 'instruction')
  }

  function press(event: KeyboardEvent<HTMLTableElement>) {
    const field = event.target instanceof HTMLInputElement ? event.target : null
    const step = steps.find((one) => one.id === field?.dataset.row)
    if (!step) return
    if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) {
      event.preventDefault()
      onSteps((now) => moveRow(now, step.id, event.key === 'ArrowUp' ? -1 : 1))
      focusCell(sheet.current, step.id, field?.dataset.col ?? 'phase')
    } else if (event.altKey && (event.key === 'Delete' || event.key === 'Backspace')) {
      event.preventDefault()
      remove(step.id)
    } else if (walkSheet(event) === 'past the end') addStep(step.id)
  }

  return (
    <div>
      <div className="relative overflow-x-auto">
        <table
          ref={sheet}
          onKeyDown={press}
          className="w-full min-w-[860px] table-fixed border-collapse text-15"
        >
          <caption className="sr-only">Process steps</caption>
          <thead>
            <tr className="border-b-[1.75px] border-ink text-13 text-soft [&_th]:px-1.5 [&_th]:pb-1.5 [&_th]:font-430">
              <th scope="col" className="w-9 text-left">
                step
              </th>
              {columns.map((column) => (
                <th
                  key={column.key}
                  scope="col"
                  style={{ width: column.width }}
                  className={column.align || 'text-left'}
                >
                  {column.title}
                </th>
              ))}
              <th scope="col" className="w-[98px]">
                <span className="sr-only">acts</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {steps.map((step, index) => (
              <tr
                key={step.id}
                data-line={step.id}
                data-drop={drop?.besideId === step.id ? drop.side : undefined}
                className="group border-b border-hair align-top focus-within:bg-paper data-[drop=after]:shadow-[inset_0_-3px_0_var(--ink)] data-[drop=before]:shadow-[inset_0_3px_0_var(--ink)]"
              >
                <th scope="row" className="px-1.5 pt-1.5 text-left text-16 font-750">
                  {index + 1}
                </th>
                {columns.map((column) => (
                  <td key={column.key} className="py-0.5">
                    <Cell
                      id={`${step.id}-${column.key}`}
                      data-row={step.id}
                      data-col={column.key}
                      label={`${column.title} of step ${index + 1}`}
                      value={step[column.key]}
                      error={problems.steps[step.id]?.[column.key]}
                      inputMode={column.align ? 'decimal' : undefined}
                      onText={(text) =>
                        onSteps(
                          (now) =>
                            now.map((one) => (one.id === step.id ? { ...one, [column.key]: text } : one)),
                          `${step.id} ${column.key}`,
                        )
                      }
                      className={column.align}
                    />
                  </td>
                ))}
                <td className="pt-0.5">
                  <RowActs
                    of={`step ${index + 1}`}
                    onUp={index > 0 ? () => onSteps((now) => moveRow(now, step.id, -1)) : undefined}
                    onDown={
                      index < steps.length - 1 ? () => onSteps((now) => moveRow(now, step.id, 1)) : undefined
                    }
                    onRemove={() => remove(step.id)}
                    onGrip={(event) => start(event, step.id)}
                  />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button onClick={() => addStep()}>Add step</Button>
        <TakeSteps code={code} onSteps={onSteps} />
        <UndoButtons undo={undo} />
        <p className="text-13 text-soft">
          Say B into A as the phase of the step that joins the two. Alt with up or down moves a step.
        </p>
      </div>
    </div>
  )
}
