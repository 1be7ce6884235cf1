import { ChoiceChips } from '@/components/bench/choice-chips'
import { besideKey, rotorParts } from '@/components/bench/kind-entry'
import type { PanelProps } from '@/components/bench/kind-panel'
import { PanelHead } from '@/components/bench/panel-head'
import { NumberField } from '@/components/ui/number-field'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import { tubeWords } from '@/lib/reading/rules/seen-value'
import { readTyped } from '@/lib/reading/schema/typed'
import { centrifuge } from '@/lib/science/centrifuge'
import { thousands } from '@/lib/science/methods/thousands'

const names = { rpm: 'rpm', radiusMm: 'Radius, mm', minutes: 'Minutes' } as const

/** What came out of the tube; below it the rotor, mostly as planned, and the force it makes. */
export function CentrifugePanel({ slot, text, verdict, read, type }: PanelProps) {
  const rotor = rotorParts.map((part) => {
    const key = besideKey(slot, part)
    return { part, key, text: read(key) || String(slot.field.planned.centrifuge?.[part] ?? '') }
  })
  const [rpm, radiusMm] = rotor.map((one) => readTyped(one.text))
  const g = rpm && radiusMm && rpm > 0 && radiusMm > 0 ? centrifuge({ rpm, radiusMm }).rcf : null
  const isWord = tubeWords.some((word) => word === text)
  return (
    <div className="grid gap-x-7 gap-y-4 sm:grid-cols-[minmax(0,1fr)_300px] beside:grid-cols-[minmax(0,1fr)_252px]">
      <div className="grid content-start gap-4">
        <PanelHead slot={slot} />
        <p className="border-l-4 border-ink pl-3 font-650">
          Balance the rotor: equal tubes opposite each other, lid shut until it stands.
        </p>
        <ChoiceChips
          label="What the tube shows"
          columns="grid-cols-2 sm:grid-cols-2"
          choices={tubeWords.map((value) => ({ value, label: value === 'none' ? 'Nothing' : 'A trace' }))}
          picked={text}
          onPick={(value) => type(slot.key, value)}
        />
        <NumberField
          label="Or a layer, mm"
          density="bench"
          value={isWord ? '' : text}
          onText={(typed) => type(slot.key, typed)}
        />
        <p aria-live="polite" className="min-h-7 font-700 text-alarm">
          {verdict.state === 'impossible' ? verdict.sentence : null}
          {verdict.state === 'value' && verdict.isOut ? verdict.sentence : null}
        </p>
        <div className="grid grid-cols-3 gap-3">
          {rotor.map(({ part, key, text: shown }) => (
            <NumberField
              key={part}
              label={names[part]}
              density="bench"
              value={shown}
              className="px-2"
              onText={(typed) => type(key, typed)}
            />
          ))}
        </div>
        {g === null ? null : <p className="text-20">{thousands(g.toFixed(0))} times gravity</p>}
      </div>
      <NumberPad onKey={(key) => type(slot.key, afterKey(isWord ? '' : text, key))} />
    </div>
  )
}
