'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Section } from '@/components/ui/section'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { currentReadings, isTorqueJar, torqueEvery } from '@/lib/batch/rules/readings'
import { gramsText } from '@/lib/batch/rules/weighing'
import { newId } from '@/lib/db/id'
import { readDecimal, readTyped } from '@/lib/number/rules'
import { netGrams } from '@/lib/science/making'
import { dayAndHour } from './balance-choice'
import { useEntry } from './use-entry'
import { useKept } from '@/components/device/use-kept'
import type { BatchWork } from './work'

type Jar = BatchPage['jars'][number]

/** Jars as they are filled: empty, full, and the torque of the first and of every tenth closure. Rows are optional. */
export function FillPart({ work }: { work: BatchWork }) {
  const { batch } = work
  const [corrected, setCorrected] = useState<Jar | null>(null)
  const isOpen = work.mayWrite && batch.state !== 'rejected'
  if (!isOpen && !batch.jars.length) return null
  const current = new Set(currentReadings(batch.jars).map((jar) => jar.id))
  return (
    <Section
      title="Fill"
      sentence={`Empty and full jar, as far as the lab weighs them; the closure torque of the first and of every ${torqueEvery}th jar.`}
    >
      {batch.jars.length ? (
        <table className="w-full max-w-[860px] border-collapse text-17">
          <caption className="sr-only">Filled jars</caption>
          <thead>
            <tr className="border-b-2 border-ink text-left">
              {['jar', 'empty, g', 'full, g', 'fill, g', 'torque, Nm', ''].map((title, index) => (
                <th key={title} scope="col" className={`py-1.5 ${index ? 'text-right' : ''}`}>
                  {title}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {batch.jars.map((jar) => (
              <tr
                key={jar.id}
                className={`border-b border-hair ${current.has(jar.id) ? '' : 'line-through'}`}
              >
                <th scope="row" className="py-2 text-left font-430">
                  {jar.number}
                  <span className="block text-14 text-soft">
                    {[jar.by, dayAndHour(jar.filledAt), jar.note, jar.reason].filter(Boolean).join(', ')}
                  </span>
                </th>
                <td className="text-right">{gramsText(jar.tareG)}</td>
                <td className="text-right">{gramsText(jar.grossG)}</td>
                <td className="text-right font-650">{gramsText(netGrams(jar.grossG, jar.tareG))}</td>
                <td className="text-right">{jar.torqueNm ?? ''}</td>
                <td className="text-right">
                  {isOpen && current.has(jar.id) ? (
                    <button
                      type="button"
                      onClick={() => setCorrected(corrected?.id === jar.id ? null : jar)}
                      className="min-h-16 px-3 underline underline-offset-4 lg:min-h-11"
                    >
                      Correct<span className="sr-only"> jar {jar.number}</span>
                    </button>
                  ) : null}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      ) : null}
      {isOpen ? (
        <FillForm
          key={`${corrected?.id ?? 'new'} ${batch.jars.length}`}
          work={work}
          corrected={corrected}
          onKept={() => setCorrected(null)}
        />
      ) : null}
    </Section>
  )
}

function FillForm({
  work,
  corrected,
  onKept,
}: {
  work: BatchWork
  corrected: Jar | null
  onKept: () => void
}) {
  const { batch } = work
  const { keep, isSending, fields, refusal } = useEntry(work)
  const [id] = useState(newId)
  const next = Math.max(0, ...batch.jars.map((jar) => jar.number)) + 1
  const [typed, set, forget] = useKept(
    `batch.${batch.id}.jar.${corrected?.id ?? next}`,
    corrected
      ? {
          ...{
            number: String(corrected.number),
            tare: String(corrected.tareG),
            gross: String(corrected.grossG),
          },
          ...{ torque: corrected.torqueNm === null ? '' : String(corrected.torqueNm), reason: '' },
        }
      : { number: String(next), tare: '', gross: '', torque: '', reason: '' },
  )
  const number = readDecimal(typed.number) ?? next

  async function save(event: FormEvent) {
    event.preventDefault()
    const body = {
      ...{
        id,
        number: readTyped(typed.number),
        tareG: readTyped(typed.tare),
        grossG: readTyped(typed.gross),
      },
      ...{ torqueNm: readTyped(typed.torque), supersedes: corrected?.id ?? null, reason: typed.reason },
    }
    if (!(await keep({ id, kind: 'fills', name: `Jar ${typed.number}`, body }))) return
    forget()
    onKept()
  }

  return (
    <form
      noValidate
      onSubmit={(event) => void save(event)}
      className="mt-3 grid max-w-[860px] grid-cols-2 gap-4 sm:grid-cols-4"
    >
      <NumberField
        label="Jar"
        value={typed.number}
        readOnly={corrected !== null}
        error={fields['number']}
        onText={(text) => set({ number: text })}
      />
      <NumberField
        label="Empty"
        unit="g"
        value={typed.tare}
        error={fields['tareG']}
        onText={(tare) => set({ tare })}
      />
      <NumberField
        label="Full"
        unit="g"
        value={typed.gross}
        error={fields['grossG']}
        onText={(gross) => set({ gross })}
      />
      <NumberField
        label="Torque"
        unit="Nm"
        value={typed.torque}
        error={fields['torqueNm']}
        hint={isTorqueJar(number) ? 'Measured on this one.' : 'Not asked of this one.'}
        onText={(torque) => set({ torque })}
      />
      {corrected ? (
        <Field
          label="Why the jar is corrected"
          value={typed.reason}
          error={fields['reason']}
          onText={(reason) => set({ reason })}
          wrap="col-span-full"
        />
      ) : null}
      <div className="col-span-full flex flex-col gap-3">
        <ErrorNote error={refusal} />
        <div>
          <Button type="submit" busy={isSending}>
            {corrected ? `Keep the corrected jar ${typed.number}` : `Keep jar ${typed.number}`}
          </Button>
        </div>
      </div>
    </form>
  )
}
