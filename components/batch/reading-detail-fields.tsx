import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { phPaths } from '@/lib/batch/rules/readings'
import { instrumentDoubt } from '@/lib/batch/rules/weighing'
import type { BatchAttribute } from '@/lib/batch/schema'

export type DetailTexts = Record<
  'path' | 'ratio' | 'sampleTemperatureC' | 'spindle' | 'rpm' | 'radiusMm' | 'minutes',
  string
>

type Props = {
  attribute: BatchAttribute
  batch: BatchPage
  texts: DetailTexts
  instrumentId: string
  fields: Record<string, string>
  onTexts: (change: Partial<DetailTexts>) => void
  onInstrument: (id: string) => void
}

const kindFor: Partial<Record<BatchAttribute, string>> = { ph: 'meter', viscosity: 'viscometer' }

/** How it was come by: instrument, path of the pH, spindle and speed, rotor. */
export function ReadingDetailFields(props: Props) {
  const { attribute, batch, texts, instrumentId, fields, onTexts, onInstrument } = props
  const kind = kindFor[attribute]
  const instruments = batch.instruments.filter((one) => one.kind === kind)
  const chosen = instruments.find((one) => one.id === instrumentId)
  const doubt = chosen ? instrumentDoubt(chosen, batch.today) : null
  const spindles = chosen?.spindles ?? []
  const number = (
    key: 'rpm' | 'radiusMm' | 'minutes' | 'sampleTemperatureC',
    label: string,
    unit: string,
  ) => (
    <NumberField
      label={label}
      unit={unit}
      value={texts[key]}
      error={fields[`detail.${key}`]}
      onText={(text) => onTexts({ [key]: text })}
    />
  )
  return (
    <>
      {instruments.length ? (
        <Select
          label="Read with"
          empty="Choose"
          value={chosen?.id ?? ''}
          error={fields['instrumentId'] ?? doubt ?? undefined}
          options={instruments.map(({ id, code, name }) => ({ value: id, label: `${code}, ${name}` }))}
          onPick={onInstrument}
        />
      ) : null}
      {attribute === 'ph' ? (
        <>
          <Select
            label="How"
            value={texts.path}
            error={fields['detail.path']}
            options={phPaths.map((path) => ({ value: path, label: path }))}
            onPick={(path) => onTexts({ path })}
          />
          {texts.path === 'extract' ? (
            <Field
              label="Ratio of the extract"
              value={texts.ratio}
              error={fields['detail.ratio']}
              hint="Such as 1 : 9 in water."
              onText={(ratio) => onTexts({ ratio })}
            />
          ) : null}
        </>
      ) : null}
      {attribute === 'viscosity' ? (
        <>
          {spindles.length ? (
            <Select
              label="Spindle"
              empty="None, mPa·s is typed"
              value={texts.spindle}
              error={fields['detail.spindle']}
              options={spindles.map(({ name }) => ({ value: name, label: name }))}
              onPick={(spindle) => onTexts({ spindle })}
            />
          ) : null}
          {texts.spindle ? number('rpm', 'Turns', 'rpm') : null}
        </>
      ) : null}
      {attribute === 'centrifuge' ? (
        <>
          {number('rpm', 'Rotor', 'rpm')}
          {number('radiusMm', 'Radius', 'mm')}
          {number('minutes', 'Ran', 'min')}
        </>
      ) : null}
      {['ph', 'viscosity', 'density', 'centrifuge'].includes(attribute)
        ? number('sampleTemperatureC', 'Sample', '°C')
        : null}
    </>
  )
}
