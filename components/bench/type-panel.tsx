import { ChoiceChips } from '@/components/bench/choice-chips'
import { besideKey, typeMethods } from '@/components/bench/kind-entry'
import type { PanelProps } from '@/components/bench/kind-panel'
import { PanelHead } from '@/components/bench/panel-head'
import { outsidePhases } from '@/lib/reading/schema/entry'

const shows: Record<string, string> = {
  dilution: 'A drop spreads in whatever is outside.',
  dye: 'The dye runs through the phase that it dissolves in when that one is outside.',
  conductivity: 'Water outside conducts; oil outside hardly does, under 1 microsiemens per cm.',
}

/** How the type was tested and what is outside; a change of it outweighs every number. */
export function TypePanel({ slot, text, verdict, read, type }: PanelProps) {
  const key = besideKey(slot, 'method')
  const method = read(key)
  const turned = verdict.state === 'value' && verdict.value === 2
  return (
    <div className="grid gap-4">
      <PanelHead slot={slot} />
      <ChoiceChips
        label="Tested by"
        choices={typeMethods.map((value) => ({ value, label: `by ${value}` }))}
        picked={method}
        onPick={(value) => type(key, value)}
      />
      {method ? <p className="text-17">{shows[method]}</p> : null}
      <ChoiceChips
        label="What is outside"
        choices={outsidePhases.map((value) => ({ value, label: value }))}
        picked={text}
        onPick={(value) => type(slot.key, value)}
      />
      <p aria-live="polite" className={`min-h-7 ${turned ? 'font-700 text-alarm' : 'font-650'}`}>
        {verdict.state === 'impossible' ? verdict.sentence : null}
        {turned ? 'The emulsion has turned over. It is out whatever the numbers say.' : null}
        {verdict.state === 'value' && verdict.value === 0 ? 'As it was made.' : null}
        {verdict.state === 'value' && verdict.value === 1 ? 'Test again, or by another way.' : null}
      </p>
    </div>
  )
}
