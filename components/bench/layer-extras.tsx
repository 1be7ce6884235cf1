import { ChoiceChips } from '@/components/bench/choice-chips'
import type { PanelProps } from '@/components/bench/kind-panel'
import { besideKey } from '@/components/bench/kind-entry'
import { NumberField } from '@/components/ui/number-field'
import { plainRulerMm } from '@/lib/reading/rules/layers-value'

const bleeds = ['0', '1', '2', '3', '4'] as const

/** What no height says: a layer too thin for the ruler, bleed without a layer, and a cream layer apart from both. */
export function LayerExtras({ slot, text, read, type }: Pick<PanelProps, 'slot' | 'text' | 'read' | 'type'>) {
  const rulerMm = slot.field.planned.rulerMm ?? plainRulerMm
  const [bleedKey, creamKey] = [besideKey(slot, 'bleed'), besideKey(slot, 'cream')]
  return (
    <div className="mt-4 grid gap-4 border-t-2 border-hair pt-3 sm:grid-cols-2">
      <button
        type="button"
        aria-pressed={text === 'hairline'}
        onClick={() => type(slot.key, text === 'hairline' ? '' : 'hairline')}
        className={`min-h-16 rounded px-4 text-left text-20 ${text === 'hairline' ? 'border-[3px] border-ink bg-paper font-700' : 'border-2 border-rule bg-ground'}`}
      >
        A hairline, under the {rulerMm} mm that the ruler tells
      </button>
      <NumberField
        label="Cream layer, mm, apart from oil and water"
        density="bench"
        value={read(creamKey)}
        onText={(typed) => type(creamKey, typed)}
      />
      <div className="sm:col-span-2">
        <p className="mb-2 text-17">
          Bleed where there is no layer: 0 none, 1 film, 2 beads, 3 drops, 4 a run
        </p>
        <ChoiceChips
          label="Bleed"
          columns="grid-cols-5 sm:grid-cols-5"
          choices={bleeds.map((value) => ({ value, label: value }))}
          picked={read(bleedKey)}
          onPick={(value) => type(bleedKey, read(bleedKey) === value ? '' : value)}
        />
      </div>
    </div>
  )
}
