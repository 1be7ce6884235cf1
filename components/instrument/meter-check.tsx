'use client'

import { Button } from '@/components/ui/button'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { bufferOf } from '@/lib/calibration/rules'
import { lotDoubt } from '@/lib/lot/rules'
import type { LotRow } from '@/lib/lot/queries'
import { grouped, readDecimal } from '@/lib/number/rules'
import { ScienceError } from '@/lib/science/guard'
import { phSlope, type PhSlope } from '@/lib/science/ph-slope'

/** One buffer as it is entered: which one ("phthalate", a lot's id, or "typed"), its pH where typed, and what the meter shows. */
export type BufferDraft = { buffer: string; ph: string; mV: string }
export type MeterDraft = { temperature: string; buffers: BufferDraft[] }

type Props = {
  draft: MeterDraft
  lots: LotRow[]
  today: string
  fields: Record<string, string>
  onDraft: (draft: MeterDraft) => void
}

const standards = [
  { value: 'phthalate', label: 'phthalate, 4.01 at 25 °C' },
  { value: 'phosphate', label: 'phosphate, 6.86 at 25 °C' },
  { value: 'borax', label: 'borax, 9.18 at 25 °C' },
]

/** pH calibration by its buffer points: the value at the temperature from the table, the slope as it is typed. */
export function MeterCheck({ draft, lots, today, fields, onDraft }: Props) {
  const bottles = lots.filter((lot) => lot.kind === 'buffer' && !lot.isUsedUp)
  const set = (index: number, change: Partial<BufferDraft>) =>
    onDraft({
      ...draft,
      buffers: draft.buffers.map((one, at) => (at === index ? { ...one, ...change } : one)),
    })
  const fit = fitOf(draft, lots)
  return (
    <div className="grid gap-3">
      <NumberField
        label="Buffers at"
        unit="°C"
        value={draft.temperature}
        onText={(temperature) => onDraft({ ...draft, temperature })}
        error={fields['check.temperatureC']}
        wrap="w-[150px]"
      />
      {draft.buffers.map((one, index) => {
        const ph = phOf(one, readDecimal(draft.temperature), lots)
        const lot = bottles.find((bottle) => bottle.id === one.buffer)
        const old = lot && lotDoubt(lot, today)
        return (
          <div key={index} className="flex flex-wrap items-start gap-3">
            <Select
              label={`Buffer ${index + 1}`}
              value={one.buffer}
              options={[
                ...standards,
                ...bottles.map((bottle) => ({
                  value: bottle.id,
                  label: `${bottle.name}, lot ${bottle.lot}`,
                })),
                { value: 'typed', label: 'another, by its certificate' },
              ]}
              onPick={(buffer) => set(index, { buffer })}
              error={fields[`check.points.${index}.lotId`] ?? old ?? undefined}
              wrap="min-w-[200px] flex-1"
            />
            <NumberField
              label="pH"
              value={one.buffer === 'typed' ? one.ph : (ph?.toFixed(3) ?? '')}
              onText={(text) => set(index, { ph: text })}
              readOnly={one.buffer !== 'typed'}
              error={fields[`check.points.${index}.bufferPh`]}
              wrap="w-[96px]"
            />
            <NumberField
              label="shows"
              unit="mV"
              value={one.mV}
              onText={(mV) => set(index, { mV })}
              error={fields[`check.points.${index}.mV`]}
              wrap="w-[130px]"
            />
          </div>
        )
      })}
      {draft.buffers.length < 3 ? (
        <div>
          <Button
            kind="link"
            onClick={() =>
              onDraft({ ...draft, buffers: [...draft.buffers, { buffer: 'borax', ph: '', mV: '' }] })
            }
          >
            A third buffer
          </Button>
        </div>
      ) : null}
      <p aria-live="polite" className="min-h-[44px] text-17">
        {fit ? (
          <>
            <b className={fit.doubt ? 'text-alarm' : ''}>Slope {fit.efficiencyPercent.toFixed(1)} %</b> of the
            theoretical one, {fit.slopeMvPerPh.toFixed(2).replace('-', '−')} mV a pH; zero point{' '}
            {grouped(fit.offsetMv, 1)} mV at pH 7.
            {fit.doubt ? <span className="block text-alarm">{fit.doubt}.</span> : null}
          </>
        ) : (
          <span className="text-soft">Slope and zero point show here once two buffers are typed.</span>
        )}
      </p>
    </div>
  )
}

export function pointOf({ buffer, ph, mV }: BufferDraft, readTyped: (text: string) => unknown) {
  const shown = { mV: readTyped(mV) }
  if (buffer === 'typed') return { ...shown, bufferPh: readTyped(ph) ?? undefined }
  return standards.some((one) => one.value === buffer) ? { ...shown, buffer } : { ...shown, lotId: buffer }
}

function phOf(one: BufferDraft, temperatureC: number | null, lots: LotRow[]): number | null {
  if (one.buffer === 'typed') return readDecimal(one.ph)
  if (temperatureC === null) return null
  const isStandard = standards.some((standard) => standard.value === one.buffer)
  try {
    return bufferOf(
      { mV: 0, ...(isStandard ? { buffer: one.buffer as 'borax' } : { lotId: one.buffer }) },
      temperatureC,
      lots,
    )
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

function fitOf(draft: MeterDraft, lots: LotRow[]): PhSlope | null {
  const temperatureC = readDecimal(draft.temperature)
  if (temperatureC === null) return null
  const points = draft.buffers.flatMap((one) => {
    const [bufferPh, mV] = [phOf(one, temperatureC, lots), readDecimal(one.mV)]
    return bufferPh === null || mV === null ? [] : [{ bufferPh, mV }]
  })
  if (points.length < 2) return null
  try {
    return phSlope({ points, temperatureC })
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}
