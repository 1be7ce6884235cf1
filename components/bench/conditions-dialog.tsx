'use client'

import { useState } from 'react'
import { conditionsUsed, type Slot } from '@/components/bench/draft'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import {
  conditionKeys,
  paths,
  phMethods,
  type Conditions,
  type Path,
  type PhMethod,
} from '@/lib/reading/rules/conditions'
import { readTyped } from '@/lib/reading/schema/typed'

type Props = { jar: BenchJarPage; entry: JarEntry; slot: Slot; onClose: () => void }

const numbers = [
  ['extractParts', 'Extract, 1 to'],
  ['extractMinutes', 'It stood, min'],
  ['rpm', 'Speed, rpm'],
  ['seconds', 'Read after, s'],
  ['restMinutes', 'Rest before it, min'],
  ['sampleTemperatureC', 'Sample, °C'],
] as const
type NumberKey = (typeof numbers)[number][0]

/** The one place where conditions are said to differ from the initial's. */
export function ConditionsDialog({ jar, entry, slot, onClose }: Props) {
  const used = conditionsUsed(slot, entry.draft)
  const isViscosity = slot.field.kind === 'torque'
  const asked = conditionKeys(slot.field.attribute)
  const shown = numbers.filter(([key]) => asked.includes(key))
  const [texts, setTexts] = useState(
    () =>
      Object.fromEntries(shown.map(([key]) => [key, String(used[key] ?? '')])) as Record<NumberKey, string>,
  )
  const [spring, setSpring] = useState(used.spring ?? '')
  const [phMethod, setPhMethod] = useState<PhMethod | ''>(used.phMethod ?? '')
  const [spindle, setSpindle] = useState(used.spindle ?? '')
  const [path, setPath] = useState<Path | ''>(used.path ?? '')
  const [isDirect, setDirect] = useState(entry.draft.direct.includes(slot.field.attribute))
  const wrong = shown.find(([key]) => texts[key].trim() !== '' && readTyped(texts[key]) === null)

  function keep(conditions: Partial<Conditions>, direct: boolean) {
    entry.setConditions(slot, conditions, direct)
    onClose()
  }

  function typed(): Partial<Conditions> {
    const said = Object.fromEntries(shown.map(([key]) => [key, readTyped(texts[key])]))
    return isViscosity
      ? { ...said, spring: spring.trim() || null, spindle: spindle || null, path: path || null }
      : { ...said, phMethod: phMethod || null }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`How ${slot.field.label} is read`}
      sentence={`The protocol says: ${slot.field.method || 'nothing'}. What differs from the start is a doubt on the reading.`}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={() => keep({}, false)}>
            As at the start
          </Button>
          <Button
            density="bench"
            kind="primary"
            why={wrong ? `${wrong[1]} is a number.` : undefined}
            onClick={() => keep(typed(), isDirect)}
          >
            Read it so
          </Button>
        </>
      }
    >
      {isViscosity ? (
        <>
          <Checkbox
            label="Typed in mPa·s, not as torque"
            density="bench"
            checked={isDirect}
            onSet={setDirect}
          />
          <div className="grid gap-3 sm:grid-cols-2">
            <Select
              label="Spindle"
              density="bench"
              value={spindle}
              options={spindlesOf(jar, entry, slot).map((name) => ({ value: name, label: name }))}
              onPick={setSpindle}
            />
            <Select
              label="Its path"
              density="bench"
              value={path}
              empty="not said"
              options={paths.map((one) => ({ value: one, label: one }))}
              onPick={(picked) => setPath(paths.find((one) => one === picked) ?? '')}
            />
          </div>
        </>
      ) : (
        <Select
          label="How it is brought to the electrode"
          density="bench"
          value={phMethod}
          empty="not said"
          options={phMethods.map((one) => ({ value: one, label: one }))}
          onPick={(picked) => setPhMethod(phMethods.find((one) => one === picked) ?? '')}
        />
      )}
      <div className="grid gap-3 sm:grid-cols-2">
        {isViscosity ? <Field label="Spring" density="bench" value={spring} onText={setSpring} /> : null}
        {shown.map(([key, label]) => (
          <Field
            key={key}
            label={label}
            density="bench"
            inputMode="decimal"
            value={texts[key]}
            onText={(text) => setTexts((all) => ({ ...all, [key]: text }))}
          />
        ))}
      </div>
    </Dialog>
  )
}

/** The protocol's, and those whose constants belong to the instrument in use. */
function spindlesOf(jar: BenchJarPage, entry: JarEntry, slot: Slot): string[] {
  const instrument = jar.instruments.find((one) => one.id === entry.instrumentOf(slot))
  const names = [slot.field.viscosity?.spindle, slot.field.conditions.spindle]
  return [...new Set([...names, ...(instrument?.spindles ?? []).map((one) => one.name)])].filter(
    (name) => typeof name === 'string',
  )
}
