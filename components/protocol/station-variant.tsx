'use client'

import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Select } from '@/components/ui/select'
import type { PlannedCycle, PlannedStation } from '@/lib/protocol/schema'
import { NumberPart } from './number-part'

type Props = { station: PlannedStation; onChange: (change: Partial<PlannedStation>) => void }

const orientations = [
  { value: '', label: 'upright' },
  { value: 'lying', label: 'lying' },
  { value: 'inverted', label: 'inverted' },
]
const lights = [
  { value: '', label: 'as the station is' },
  { value: 'exposed', label: 'in light' },
  { value: 'in foil', label: 'in light, in foil' },
]
const usualCycle: PlannedCycle = {
  coldC: -10,
  coldHours: 16,
  warmC: 25,
  warmHours: 8,
  isFrozenThrough: true,
}

/** How a station's jars stand and in what; two stations may differ in nothing else. */
export function StationVariant({ station, onChange }: Props) {
  return (
    <div className="flex w-full flex-wrap items-end gap-3">
      <Select
        label="Jars stand"
        value={station.orientation ?? ''}
        options={orientations}
        onPick={(value) => onChange({ orientation: (value || undefined) as PlannedStation['orientation'] })}
        wrap="w-[130px]"
      />
      {station.kind === 'temperature' ? (
        <Select
          label="Light"
          value={station.light ?? ''}
          options={lights}
          onPick={(value) => onChange({ light: (value || undefined) as PlannedStation['light'] })}
          wrap="w-[170px]"
        />
      ) : null}
      <Checkbox
        label="In the product's own pack"
        checked={station.isOwnPack ?? false}
        onSet={(isOn) => onChange({ isOwnPack: isOn ? true : undefined })}
      />
      {station.kind === 'freeze-thaw' ? <Cycle station={station} onChange={onChange} /> : null}
    </div>
  )
}

function Cycle({ station: { cycle }, onChange }: Props) {
  if (!cycle) {
    return (
      <Button kind="link" onClick={() => onChange({ cycle: usualCycle })}>
        Say what a cycle is
      </Button>
    )
  }
  const set = (change: Partial<PlannedCycle>) => onChange({ cycle: { ...cycle, ...change } })
  return (
    <div role="group" aria-label="One cycle" className="flex w-full flex-wrap items-end gap-3">
      <NumberPart label="Cold, °C" value={cycle.coldC} onNumber={(coldC) => set({ coldC })} />
      <NumberPart label="Cold, hours" value={cycle.coldHours} onNumber={(coldHours) => set({ coldHours })} />
      <NumberPart label="Warm, °C" value={cycle.warmC} onNumber={(warmC) => set({ warmC })} />
      <NumberPart label="Warm, hours" value={cycle.warmHours} onNumber={(warmHours) => set({ warmHours })} />
      <Checkbox
        label="Frozen through"
        checked={cycle.isFrozenThrough}
        onSet={(isFrozenThrough) => set({ isFrozenThrough })}
      />
      <Button kind="link" onClick={() => onChange({ cycle: undefined })}>
        As the station cycles
      </Button>
    </div>
  )
}
