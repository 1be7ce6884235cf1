'use client'

import { TZDate } from '@date-fns/tz'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'

type Props = {
  label: string
  /** As a field of date and time has it, in the lab's zone; null: now. */
  value: string | null
  now: string
  zone: string
  error?: string | undefined
  onSet: (value: string | null) => void
}

/** Now, by the server; or the earlier time that the person gives, which is kept as claimed. */
export function EarlierTime({ label, value, now, zone, error, onSet }: Props) {
  if (value === null) {
    return (
      <div>
        <Button density="bench" onClick={() => onSet(typedIn(now, zone))}>
          {label}
        </Button>
      </div>
    )
  }
  return (
    <div className="flex flex-wrap items-end gap-3">
      <Field
        type="datetime-local"
        label={`${label}, in ${zone}`}
        density="bench"
        value={value}
        onText={onSet}
        error={error}
        wrap="min-w-[260px] flex-1"
      />
      <Button density="bench" onClick={() => onSet(null)}>
        Now
      </Button>
    </div>
  )
}

export function instantOfTyped(typed: string, zone: string): string | null {
  const match = /^(\d{4})-(\d\d)-(\d\d)T(\d\d):(\d\d)/.exec(typed)
  if (!match) return null
  const [year, month, day, hour, minute] = match.slice(1).map(Number) as [
    number,
    number,
    number,
    number,
    number,
  ]
  return new Date(new TZDate(year, month - 1, day, hour, minute, zone).getTime()).toISOString()
}

/** As a field of date and time has it. */
export function typedIn(instant: string, zone: string): string {
  return new TZDate(instant, zone).toISOString().slice(0, 16)
}
