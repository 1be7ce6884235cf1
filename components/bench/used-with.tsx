'use client'

import { useState } from 'react'
import { ConditionsDialog } from '@/components/bench/conditions-dialog'
import { conditionsUsed, type Slot } from '@/components/bench/draft'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { conditionKeys, conditionWords } from '@/lib/reading/rules/conditions'
import { instrumentKind } from '@/lib/reading/rules/instrument-kind'
import { shortDay } from '@/lib/report/rules'

type Props = { jar: BenchJarPage; entry: JarEntry; slot: Slot }

/** With which instrument and under which conditions, in one line; changed where they are not as at the start. */
export function UsedWith({ jar, entry, slot }: Props) {
  const [isChanging, setChanging] = useState(false)
  const kind = instrumentKind(slot.field.attribute)
  const instruments = jar.instruments.filter((one) => one.kind === kind)
  const chosen = entry.instrumentOf(slot)
  const used = conditionsUsed(slot, entry.draft)
  const hasConditions = conditionKeys(slot.field.attribute).length > 0
  if (instruments.length === 0 && !hasConditions)
    return (
      <p className="text-17 text-soft">
        {slot.kind === 'gross' ? 'closed, with its fill' : slot.field.method}
      </p>
    )
  return (
    <div className="mb-1 flex flex-wrap items-start gap-x-3">
      {instruments.length > 0 ? (
        <div className="flex gap-3" role="group" aria-label="Instrument">
          {instruments.map((one) => (
            <button
              key={one.id}
              type="button"
              aria-pressed={chosen === one.id}
              onClick={() => entry.chooseInstrument(slot, one.id)}
              className={`min-h-16 rounded bg-paper px-3 text-left leading-tight ${chosen === one.id ? 'border-[2.5px] border-ink font-700' : 'border-2 border-rule'}`}
            >
              {one.code}
              <span
                className={`block text-16 font-430 ${stateOf(one).isBad ? 'font-650 text-alarm' : 'text-soft'}`}
              >
                {stateOf(one).says}
              </span>
            </button>
          ))}
        </div>
      ) : null}
      {hasConditions ? (
        <button
          type="button"
          onClick={() => setChanging(true)}
          className="min-h-16 min-w-0 flex-1 basis-44 rounded border-2 border-transparent text-left text-17 leading-tight text-soft underline decoration-dotted underline-offset-4"
        >
          {conditionWords(used) || slot.field.method || 'Conditions'}
          {entry.isChanged(slot) ? <b className="text-ink">, not as at the start</b> : ': as at the start'}
        </button>
      ) : null}
      {isChanging ? (
        <ConditionsDialog jar={jar} entry={entry} slot={slot} onClose={() => setChanging(false)} />
      ) : null}
    </div>
  )
}

function stateOf({ isOverdue, dueOn, result, hasFailedCheck }: BenchJarPage['instruments'][number]) {
  if (hasFailedCheck) return { isBad: true, says: 'daily check failed' }
  if (result === 'doubtful') return { isBad: true, says: 'calibration doubtful' }
  if (dueOn === null) return { isBad: true, says: 'never calibrated' }
  return isOverdue
    ? { isBad: true, says: 'calibration overdue' }
    : { isBad: false, says: `good until ${shortDay(dueOn)}` }
}
