import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { dropletMeasureWords } from '@/lib/protocol/rules/words'
import { dropletMeasures, type PlannedAttribute } from '@/lib/protocol/schema'
import { conditionKeys } from '@/lib/reading/rules/conditions'
import { centrifuge } from '@/lib/science/centrifuge'
import { thousands } from '@/lib/science/methods/thousands'
import { NumberPart } from './number-part'
import { ReadingConditions } from './reading-conditions'

type Props = { planned: PlannedAttribute; onChange: (more: Partial<PlannedAttribute>) => void }

/** What belongs to one attribute alone: spindle, ruler, rotor, diameter. */
export function AttributeConditions({ planned, onChange }: Props) {
  return (
    <div className="mt-3 flex flex-wrap items-end gap-3 empty:hidden sm:ml-[132px]">
      {planned.attribute === 'viscosity' ? <Spindle planned={planned} onChange={onChange} /> : null}
      {conditionKeys(planned.attribute).length > 0 ? (
        <ReadingConditions planned={planned} onChange={onChange} />
      ) : null}
      {planned.attribute === 'separation' ? (
        <NumberPart
          label="The ruler tells, mm"
          value={planned.rulerMm ?? 1}
          onNumber={(rulerMm) => onChange({ rulerMm })}
          wrap="w-[150px]"
        />
      ) : null}
      {planned.attribute === 'droplets' ? (
        <Select
          label="The band is about"
          value={planned.dropletMeasure ?? 'd50v'}
          options={dropletMeasures.map((value) => ({ value, label: dropletMeasureWords[value] }))}
          onPick={(value) => onChange({ dropletMeasure: dropletMeasures.find((one) => one === value) })}
          wrap="w-[240px]"
        />
      ) : null}
      {planned.attribute === 'centrifuge' ? <Rotor planned={planned} onChange={onChange} /> : null}
      {planned.attribute === 'separation' ? null : (
        <Checkbox
          label="Only once, before the study starts"
          checked={planned.isInitialOnly ?? false}
          onSet={(isOn) => onChange({ isInitialOnly: isOn || undefined })}
        />
      )}
    </div>
  )
}

function Spindle({ planned, onChange }: Props) {
  const viscosity = planned.viscosity ?? { spindle: '', spindleConstant: 10_000, rpm: 10 }
  const set = (more: Partial<typeof viscosity>) => onChange({ viscosity: { ...viscosity, ...more } })
  return (
    <>
      <Field
        label="Spindle"
        value={viscosity.spindle}
        onText={(spindle) => set({ spindle })}
        wrap="w-[160px]"
      />
      <NumberPart
        label="Spindle constant"
        value={viscosity.spindleConstant}
        onNumber={(spindleConstant) => set({ spindleConstant })}
        wrap="w-[150px]"
      />
      <NumberPart label="rpm" value={viscosity.rpm} onNumber={(rpm) => set({ rpm })} wrap="w-[90px]" />
    </>
  )
}

function Rotor({ planned, onChange }: Props) {
  const rotor = planned.centrifuge ?? { rpm: 3000, radiusMm: 100, minutes: 30 }
  const set = (more: Partial<typeof rotor>) => onChange({ centrifuge: { ...rotor, ...more } })
  const { rcf } = rotor.rpm > 0 && rotor.radiusMm > 0 ? centrifuge(rotor) : { rcf: 0 }
  return (
    <>
      <NumberPart label="rpm" value={rotor.rpm} onNumber={(rpm) => set({ rpm })} wrap="w-[90px]" />
      <NumberPart
        label="Radius, mm"
        value={rotor.radiusMm}
        onNumber={(radiusMm) => set({ radiusMm })}
        wrap="w-[110px]"
      />
      <NumberPart
        label="Minutes"
        value={rotor.minutes}
        onNumber={(minutes) => set({ minutes })}
        wrap="w-[90px]"
      />
      <p className="pb-1.5 text-15">{thousands(rcf.toFixed(0))} times gravity</p>
    </>
  )
}
