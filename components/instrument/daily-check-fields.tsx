'use client'

import { Checkbox } from '@/components/ui/checkbox'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import type { DailyCheck } from '@/lib/instrument/schema'
import { readTyped } from '@/lib/number/rules'

export type CheckDraft = { [key: string]: string } | null
type Props = {
  kind: string
  draft: CheckDraft
  fields: Record<string, string>
  onDraft: (draft: CheckDraft) => void
}

/** What is tried each morning, as a manager sets it: what is known of it and how far off it may be. */
export function DailyCheckFields({ kind, draft, fields, onDraft }: Props) {
  const part = (key: string, label: string, unit?: string) => (
    <NumberField
      label={label}
      unit={unit}
      value={draft?.[key] ?? ''}
      onText={(text) => onDraft({ ...draft, [key]: text })}
      error={fields[`dailyCheck.${key}`]}
      wrap="w-[150px]"
    />
  )
  return (
    <div className="grid gap-2">
      <Checkbox
        label="It is checked every morning"
        checked={draft !== null}
        onSet={(isChecked) => onDraft(isChecked ? startOf(kind) : null)}
      />
      {draft ? (
        <div className="flex flex-wrap items-start gap-3">
          {kind === 'balance' ? (
            <>
              {part('weightG', 'Check weight', 'g')}
              {part('allowedG', 'May be off by', 'g')}
            </>
          ) : null}
          {kind === 'viscometer' ? (
            <>
              {part('fluidMPas', 'Check fluid', 'mPa·s')}
              {part('temperatureC', 'at', '°C')}
              {part('allowedPercent', 'May be off by', '%')}
              <Field
                label="Spindle"
                value={draft['spindle'] ?? ''}
                onText={(spindle) => onDraft({ ...draft, spindle })}
                error={fields['dailyCheck.spindle']}
                wrap="w-[150px]"
              />
              {part('rpm', 'Speed', 'rpm')}
            </>
          ) : null}
          {kind === 'meter' ? (
            <>
              <Select
                label="Check buffer"
                value={draft['buffer'] ?? ''}
                empty="by its pH"
                options={[
                  { value: 'phthalate', label: 'phthalate, 4.01' },
                  { value: 'phosphate', label: 'phosphate, 6.86' },
                  { value: 'borax', label: 'borax, 9.18' },
                ]}
                onPick={(buffer) => onDraft({ ...draft, buffer })}
                wrap="w-[180px]"
              />
              {draft['buffer'] ? null : part('bufferPh', 'Its pH')}
              {part('allowedPh', 'May be off by', 'pH')}
            </>
          ) : null}
        </div>
      ) : null}
    </div>
  )
}

function startOf(kind: string): NonNullable<CheckDraft> {
  if (kind === 'meter') return { buffer: 'phosphate', allowedPh: '0.05' }
  return kind === 'viscometer' ? { temperatureC: '25', allowedPercent: '2' } : { allowedG: '0.01' }
}

export function draftOf(check: DailyCheck | null): CheckDraft {
  if (!check) return null
  return Object.fromEntries(
    Object.entries(check).flatMap(([key, value]) =>
      key === 'kind' || value === null ? [] : [[key, String(value)]],
    ),
  )
}

/** As it is sent. */
export function checkOf(kind: string, draft: CheckDraft) {
  if (!draft) return null
  const number = (key: string) => readTyped(draft[key] ?? '')
  if (kind === 'balance') return { kind, weightG: number('weightG'), allowedG: number('allowedG') }
  if (kind === 'meter') {
    const buffer = draft['buffer'] || null
    return { kind, buffer, bufferPh: buffer ? null : number('bufferPh'), allowedPh: number('allowedPh') }
  }
  return {
    kind,
    spindle: draft['spindle'] ?? '',
    rpm: number('rpm'),
    temperatureC: number('temperatureC'),
    fluidMPas: number('fluidMPas'),
    allowedPercent: number('allowedPercent'),
  }
}
