'use client'

import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { RadioGroup } from '@/components/ui/radio-group'
import { matrixed, priceOf } from '@/lib/protocol/rules/matrixing'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'

type Props = {
  plan: ProtocolPlan
  onChange: (plan: ProtocolPlan) => void
  fields: Record<string, string>
}

const parts = [
  { key: 'factor', label: 'What differs', example: 'fill size' },
  { key: 'low', label: 'The one end', example: '15 mL' },
  { key: 'high', label: 'The other end', example: '100 mL' },
  { key: 'between', label: 'What lies between', example: '30 and 50 mL' },
] as const

/** Matrixing and bracketing, each with what it costs [std: ICH Q1D]. */
export function ReadLess({ plan, onChange, fields }: Props) {
  const chosen = plan.matrixing?.attributes ?? []
  const pick = (attribute: AttributeKey, isOn: boolean) =>
    onChange(matrixed(plan, isOn ? [...chosen, attribute] : chosen.filter((one) => one !== attribute)))
  const { bracketing } = plan
  return (
    <div className="grid gap-3">
      <fieldset>
        <legend className="text-15">Matrixed: read at every second of the middle time points</legend>
        <div className="flex flex-wrap gap-x-6">
          {plan.attributes.map(({ attribute }) => (
            <Checkbox
              key={attribute}
              label={attributeName(attribute)}
              checked={chosen.includes(attribute)}
              onSet={(isOn) => pick(attribute, isOn)}
            />
          ))}
        </div>
      </fieldset>
      <RadioGroup
        label="Batches measured at a middle time point"
        value={plan.batchMatrixing ?? 'all'}
        onPick={(share) =>
          onChange({
            ...plan,
            batchMatrixing: share === 'all' ? undefined : (share as 'half' | 'two thirds'),
          })
        }
        options={[
          { value: 'all', label: 'all' },
          { value: 'two thirds', label: 'two thirds of them, by turns' },
          { value: 'half', label: 'half of them, by turns' },
        ]}
      />
      <Checkbox
        label="Bracketed: only the extremes of one factor are tested"
        checked={bracketing !== undefined}
        onSet={(isOn) =>
          onChange({
            ...plan,
            bracketing: isOn ? { factor: '', low: '', high: '', between: '' } : undefined,
          })
        }
      />
      {bracketing ? (
        <div className="flex flex-wrap gap-3">
          {parts.map(({ key, label, example }) => (
            <Field
              key={key}
              label={label}
              placeholder={example}
              value={bracketing[key]}
              onText={(text) => onChange({ ...plan, bracketing: { ...bracketing, [key]: text } })}
              error={fields[`plan.bracketing.${key}`]}
              wrap="w-[190px]"
            />
          ))}
        </div>
      ) : null}
      <Price plan={plan} />
    </div>
  )
}

/** What can no longer be concluded. */
export function Price({ plan }: { plan: ProtocolPlan }) {
  const price = priceOf(plan)
  if (price.length === 0) return null
  return (
    <div className="max-w-[860px]">
      <p className="font-600">What it costs (ICH Q1D, from memory)</p>
      <ul className="ml-5 list-disc text-15">
        {price.map((sentence) => (
          <li key={sentence}>{sentence}</li>
        ))}
      </ul>
    </div>
  )
}
