'use client'

import type { Slot } from '@/components/bench/draft'
import { JarRuler } from '@/components/bench/jar-ruler'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { FieldBand, HollowDot } from '@/components/bench/value-panel'
import { layersFacts } from '@/components/bench/value-facts'
import { bandText } from '@/components/bench/verdict'
import { FigureDetails } from '@/components/ui/figure-details'
import { StandingMark } from '@/components/marks/standing-mark'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { readTyped } from '@/lib/reading/schema/typed'
import { shortDay } from '@/lib/report/rules'

/** The jar drawn as it is measured: layers follow the numbers, and the numbers follow the handles. */
export function LayersPanel({ jar, entry }: { jar: BenchJarPage; entry: JarEntry }) {
  const { slots, draft, at } = entry
  const top = slots.find((s) => s.part === 'top')
  const bottom = slots.find((s) => s.part === 'bottom')
  if (!top || !bottom) return null
  const fill = jar.fillHeightMm
  const mm = (slot: Slot) => readTyped(draft.texts[slot.key] ?? '') ?? 0
  const verdict = entry.tabs.find((tab) => tab.key === top.key)?.verdict
  const isOut = verdict?.state === 'value' && verdict.isOut
  const set = (slot: Slot, value: number) =>
    entry.type(slot.key, (Math.round(Math.max(0, Math.min(fill, value)) * 10) / 10).toFixed(1))
  return (
    <div className="grid grid-cols-[128px_minmax(0,1fr)] items-center gap-x-4 gap-y-2 px-4 pt-3 [grid-template-areas:'jar_sep''top_top''low_low'] sm:grid-cols-[320px_minmax(0,1fr)] sm:px-7 sm:[grid-template-areas:'jar_top''jar_sep''jar_low']">
      <div className="[grid-area:jar]">
        <JarRuler
          fillMm={fill}
          topMm={mm(top)}
          bottomMm={mm(bottom)}
          lastTopMm={lastMm(top, 'topMm')}
          lastBottomMm={lastMm(top, 'bottomMm')}
          onTop={(value) => set(top, value)}
          onBottom={(value) => set(bottom, value)}
        />
      </div>
      <div className="[grid-area:top]">
        <Layer
          title="Oil on top"
          text={draft.texts[top.key] ?? ''}
          isHere={at === top.key}
          last={lastText(top, 'topMm')}
          onPick={() => entry.goTo(top.key)}
          onStep={(by) => set(top, mm(top) + by)}
        />
      </div>
      <div aria-live="polite" className="min-w-0 [grid-area:sep]">
        <p className="flex flex-wrap items-baseline justify-between gap-x-3">
          <b className="text-18">Separation</b>
          <span className="text-17">{bandText(top.field)}</span>
        </p>
        <div className="flex items-center justify-between gap-4">
          <p className={`text-44 font-700 leading-none sm:text-64 ${isOut ? 'text-alarm' : ''}`}>
            {verdict?.state === 'value' ? (
              <FigureDetails
                figure={`${verdict.value.toFixed(1)} %`}
                facts={() => layersFacts(verdict.value, fill, mm(top), mm(bottom))}
                density="bench"
              >
                {verdict.value.toFixed(1)}
                <span className="text-24 sm:text-36"> %</span>
              </FigureDetails>
            ) : (
              <>
                –<span className="text-24 sm:text-36"> %</span>
              </>
            )}
          </p>
          {verdict?.state === 'value' ? (
            <p className={`flex items-end gap-3 text-24 font-650 sm:text-30 ${isOut ? 'text-alarm' : ''}`}>
              <StandingMark standing={isOut ? 'out' : 'steady'} size={34} />
              <span className="hidden sm:inline">{isOut ? 'out' : 'inside'}</span>
            </p>
          ) : null}
        </div>
        <button
          type="button"
          onClick={() => entry.goTo('photo')}
          className="min-h-16 text-17 underline underline-offset-4"
        >
          {draft.photoLines ? 'Measured on the photo' : 'Measure on a photo'}
        </button>
        <FieldBand
          field={top.field}
          now={verdict?.state === 'value' ? verdict.value : null}
          width={380}
          isQuiet
        />
      </div>
      <div className="[grid-area:low]">
        <Layer
          title="Water below"
          text={draft.texts[bottom.key] ?? ''}
          isHere={at === bottom.key}
          last={lastText(bottom, 'bottomMm')}
          onPick={() => entry.goTo(bottom.key)}
          onStep={(by) => set(bottom, mm(bottom) + by)}
        />
      </div>
    </div>
  )
}

type LayerProps = {
  title: string
  text: string
  isHere: boolean
  last: string | null
  onPick: () => void
  onStep: (by: number) => void
}

function Layer({ title, text, isHere, last, onPick, onStep }: LayerProps) {
  return (
    <div className="flex items-center justify-between gap-3">
      <button
        type="button"
        onClick={onPick}
        aria-pressed={isHere}
        className={`min-h-16 rounded text-left ${isHere ? 'border-b-[3px] border-ink' : 'border-b-[3px] border-transparent'}`}
      >
        <b className="block text-18">{title}</b>
        <span className="text-36 font-650 leading-none sm:text-50">{text === '' ? '–' : text}</span>
        <span className="text-20 sm:text-30"> mm</span>
        {last ? (
          <span className="block text-17">
            <HollowDot /> {last}
          </span>
        ) : null}
      </button>
      <div className="flex gap-3">
        <StepButton label={`${title}: 0.1 mm less`} sign="minus" onPress={() => onStep(-0.1)} />
        <StepButton label={`${title}: 0.1 mm more`} sign="plus" onPress={() => onStep(0.1)} />
      </div>
    </div>
  )
}

function StepButton({
  label,
  sign,
  onPress,
}: {
  label: string
  sign: 'plus' | 'minus'
  onPress: () => void
}) {
  return (
    <button
      type="button"
      aria-label={label}
      onClick={onPress}
      className="flex size-16 flex-col items-center justify-center rounded border-2 border-rule bg-paper active:bg-recess sm:size-[72px]"
    >
      <svg viewBox="0 0 32 32" width="32" height="32" aria-hidden>
        <path
          d={sign === 'plus' ? 'M4 16H28 M16 4V28' : 'M4 16H28'}
          stroke="currentColor"
          strokeWidth="3.5"
        />
      </svg>
      <span aria-hidden className="text-17 leading-none">
        0.1
      </span>
    </button>
  )
}

function lastMm(slot: Slot, part: 'topMm' | 'bottomMm'): number | null {
  const value = slot.field.last[0]?.detail[part]
  return typeof value === 'number' ? value : null
}

function lastText(slot: Slot, part: 'topMm' | 'bottomMm'): string | null {
  const last = slot.field.last[0]
  const value = lastMm(slot, part)
  return last && value !== null ? `${value.toFixed(1)} on ${shortDay(last.day)}` : null
}
