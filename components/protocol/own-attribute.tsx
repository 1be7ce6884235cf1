'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { freshOwn } from '@/lib/protocol/rules/fresh-attribute'
import type { PlannedAttribute, Tolerance } from '@/lib/protocol/schema'
import { ownKeyOf } from '@/lib/reading/schema/own-key'
import type { OwnAttribute } from '@/lib/reading/schema/own'
import { NumberPart } from './number-part'

const jars = [
  { value: 'watch', label: 'watch jar, closed' },
  { value: 'measuring', label: 'measuring jar, opened' },
]

type Props = {
  own: OwnAttribute
  tolerance: Tolerance
  onChange: (more: Partial<Pick<PlannedAttribute, 'own' | 'tolerance'>>) => void
}

/** What an attribute of the protocol's own is: a number with its unit, or words in their order, the best first. */
export function OwnDefinition({ own, tolerance, onChange }: Props) {
  const [words, setWords] = useState(own.kind === 'scale' ? own.words.join('; ') : '')
  const set = (more: Partial<OwnAttribute>) => onChange({ own: { ...own, ...more } as OwnAttribute })
  return (
    <div className="mt-3 flex flex-wrap items-end gap-3 sm:ml-[132px]">
      <Select
        label="Read from the"
        value={own.jar}
        options={jars}
        onPick={(jar) => set({ jar: jar === 'watch' ? 'watch' : 'measuring' })}
        wrap="w-[200px]"
      />
      {own.kind === 'scale' ? (
        <>
          <Field
            label="Words, the best first"
            hint="With a semicolon between them."
            value={words}
            onText={(text) => {
              setWords(text)
              set({ words: text.split(';').map((word) => word.trim()) })
            }}
            wrap="min-w-[260px] flex-1"
          />
          <Select
            label="The worst allowed"
            value={String(tolerance.kind === 'range' ? (tolerance.upper ?? 0) : 0)}
            options={own.words.map((word, place) => ({ value: String(place), label: word }))}
            onPick={(place) => onChange({ tolerance: { kind: 'range', upper: Number(place) } })}
            wrap="w-[200px]"
          />
        </>
      ) : (
        <>
          <Field label="Unit" value={own.unit} onText={(unit) => set({ unit })} wrap="w-[100px]" />
          <NumberPart
            label="Decimals"
            value={own.decimals}
            onNumber={(decimals) => set({ decimals })}
            wrap="w-[90px]"
          />
          <NumberPart label="Possible from" value={own.lower} onNumber={(lower) => set({ lower })} />
          <NumberPart label="to" value={own.upper} onNumber={(upper) => set({ upper })} wrap="w-[90px]" />
          <NumberPart
            label="Scatter of a reading"
            value={own.scatter}
            onNumber={(scatter) => set({ scatter })}
            wrap="w-[150px]"
          />
          <Checkbox
            label="Gradual: regression may carry it"
            checked={own.isGradual}
            onSet={(isGradual) => set({ isGradual })}
          />
        </>
      )}
    </div>
  )
}

type AddProps = { taken: readonly string[]; onAdd: (planned: PlannedAttribute) => void }

/** A name and whether it is a number or a scale; the rest is said in its row. */
export function AddOwn({ taken, onAdd }: AddProps) {
  const [name, setName] = useState('')
  const [kind, setKind] = useState<OwnAttribute['kind']>('number')
  const [error, setError] = useState<string | undefined>()
  function add() {
    const key = ownKeyOf(name)
    if (!key) return setError('A name has up to 40 letters, digits and single spaces.')
    if (taken.some((one) => one.toLowerCase() === key.toLowerCase())) {
      return setError('This protocol has an attribute of that name.')
    }
    onAdd(freshOwn(key, kind))
    setName('')
    setError(undefined)
  }
  return (
    <div className="mt-3 flex flex-wrap items-end gap-3">
      <Field
        label="One of your own"
        placeholder="Foam height"
        value={name}
        onText={setName}
        error={error}
        wrap="w-[240px]"
      />
      <Select
        label="It is read as"
        value={kind}
        options={[
          { value: 'number', label: 'a number' },
          { value: 'scale', label: 'a scale of words' },
        ]}
        onPick={(value) => setKind(value === 'scale' ? 'scale' : 'number')}
        wrap="w-[180px]"
      />
      <Button onClick={add}>Add it</Button>
    </div>
  )
}
