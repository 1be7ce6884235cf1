'use client'

import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { percentText } from '@/lib/formula/rules/numbers'
import type { TypedFamily } from './variant-plan'
import type { FamilyBase } from './variants-form'

type Props = {
  base: FamilyBase
  typed: TypedFamily
  errors: [string?, string?]
  onSet: (change: Partial<TypedFamily>) => void
}

/** One ingredient and its levels, and a second one if wanted. */
export function VaryFields({ base, typed, errors, onSet }: Props) {
  const options = base.lines
    .filter((line) => !line.isRemainder)
    .map((line) => ({
      value: line.id,
      label: `${line.phase}  ${line.inciName}, ${percentText(line.percentThousandths)} %`,
    }))
  const others = (place: 0 | 1) => options.filter((one) => one.value !== typed.lineIds[place === 0 ? 1 : 0])
  const put = (pair: [string, string], place: 0 | 1, text: string): [string, string] =>
    place === 0 ? [text, pair[1]] : [pair[0], text]
  return (
    <div className="grid max-w-[920px] gap-x-6 gap-y-4 sm:grid-cols-2">
      {([0, 1] as const).map((place) => (
        <div key={place} className="contents">
          <Select
            label={place === 0 ? 'Vary' : 'And with it'}
            empty={place === 0 ? 'Choose an ingredient' : 'Nothing else'}
            value={typed.lineIds[place]}
            options={others(place)}
            autoFocus={place === 0}
            onPick={(id) => onSet({ lineIds: put(typed.lineIds, place, id) })}
          />
          <Field
            label={place === 0 ? 'Over the levels, % w/w' : 'Over its levels, % w/w'}
            value={typed.levels[place]}
            error={errors[place]}
            placeholder="0.20; 0.30; 0.40"
            onText={(text) => onSet({ levels: put(typed.levels, place, text) })}
          />
        </div>
      ))}
    </div>
  )
}
