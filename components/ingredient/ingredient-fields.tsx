import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { TextArea } from '@/components/ui/text-area'
import type { TypedIngredient } from './typed-ingredient'

type Props = {
  typed: TypedIngredient
  errors: Record<string, string>
  readOnly: boolean
  onChange: (change: Partial<TypedIngredient>) => void
}

type TextKey = Exclude<keyof TypedIngredient, 'isOilPhase'>

/** Names first, then the figures that every formula takes over, then those only some ingredients have. */
export function IngredientFields({ typed, errors, readOnly, onChange }: Props) {
  const text = (key: TextKey) => ({
    value: typed[key],
    readOnly,
    onText: (next: string) => onChange({ [key]: next }),
  })
  const number = (key: TextKey, error = key as string) => ({
    ...text(key),
    inputMode: 'decimal' as const,
    className: 'text-right',
    error: errors[error],
  })
  return (
    <>
      <div className="grid items-start gap-3 sm:grid-cols-[1fr_220px]">
        <Field label="INCI name" {...text('inciName')} error={errors['inciName']} />
        <Field label="Function" {...text('function')} error={errors['function']} />
        <TextArea
          label="Synonyms"
          rows={2}
          hint="One on each line."
          {...text('synonyms')}
          error={errors['synonyms'] ?? firstOf(errors, 'synonyms.')}
        />
        <Field label="Supplier’s own name for it" {...text('supplierName')} error={errors['supplierName']} />
      </div>
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-[150px_110px_1fr_130px]">
        <Select
          label="Phase"
          value={typed.isOilPhase ? 'oil' : 'water'}
          disabled={readOnly}
          options={[
            { value: 'oil', label: 'oil phase' },
            { value: 'water', label: 'water phase' },
          ]}
          onPick={(phase) => onChange({ isOilPhase: phase === 'oil' })}
        />
        <Field label="Density, g/mL" {...number('density')} />
        <Field label="Density is from" {...text('densitySource')} error={errors['densitySource']} />
        <Field label="Price per kg" {...number('price', 'priceCentsPerKg')} />
      </div>
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-[130px_130px_1fr]">
        <Field label="Usual from, % w/w" {...number('percentLow', 'percentLowThousandths')} />
        <Field label="to, % w/w" {...number('percentHigh', 'percentHighThousandths')} />
        <Field
          label="Usual share is from"
          {...text('rangeSource')}
          error={errors['rangeSource']}
          wrap="col-span-2 sm:col-span-1"
        />
      </div>
      <fieldset className="grid grid-cols-2 items-start gap-3 border-t border-hair pt-2 sm:grid-cols-3">
        <legend className="sr-only">Only where it has one</legend>
        <p className="col-span-full text-14 text-soft">Only where it has one; the rest stays empty.</p>
        <Field label="Acid value, mg KOH/g" {...number('acidValue')} />
        <Field label="Base value, mg KOH/g" {...number('baseValue')} />
        <Field label="Must be melted above, °C" {...number('meltsAboveC')} />
        <Field label="Preserves from pH" {...number('phLow')} />
        <Field label="to pH" {...number('phHigh')} />
        <Field label="Holds inside, % v/v" {...number('holdsInternalPercent')} />
        <Field
          label="These are from"
          {...text('figuresSource')}
          error={errors['figuresSource']}
          wrap="col-span-full"
        />
      </fieldset>
      <TextArea
        label="Hazard and handling"
        rows={2}
        hint="Stands beside its line on the weighing sheet."
        {...text('caution')}
        error={errors['caution']}
      />
      <TextArea label="Notes" rows={2} {...text('note')} error={errors['note']} />
    </>
  )
}

function firstOf(errors: Record<string, string>, prefix: string): string | undefined {
  return Object.entries(errors).find(([path]) => path.startsWith(prefix))?.[1]
}
