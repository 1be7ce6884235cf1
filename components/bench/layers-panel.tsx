'use client'

import { JarRuler } from '@/components/bench/jar-ruler'
import type { FieldTab, JarEntry } from '@/components/bench/use-jar-entry'
import { FieldBand } from '@/components/bench/field-band'
import { heightOf, LastValues } from '@/components/bench/last-values'
import { layersFacts } from '@/components/bench/value-facts'
import { bandText, slotLabel } from '@/components/bench/verdict'
import { FigureDetails } from '@/components/ui/figure-details'
import { StandingMark } from '@/components/marks/standing-mark'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** The jar drawn as it is measured: layers follow the numbers, and the numbers follow the handles. */
export function LayersPanel({ jar, entry }: { jar: BenchJarPage; entry: JarEntry }) {
  const [top, bottom] = ['top', 'bottom'].map((part) => entry.tabs.find((tab) => tab.slot.part === part))
  if (!top || !bottom) return null
  const fill = jar.fillHeightMm
  const { verdict, slot } = top
  const isOut = verdict.state === 'value' && verdict.isOut
  const last = (part: 'top' | 'bottom') => {
    const text = slot.field.last[0] ? heightOf(slot.field.last[0], part) : null
    return text === null ? null : Number(text)
  }
  return (
    <div className="hidden items-center gap-x-4 gap-y-2 px-7 pt-3 sm:grid sm:grid-cols-[minmax(0,250px)_minmax(0,1fr)] beside:grid-cols-[190px_minmax(0,1fr)] sm:[grid-template-areas:'jar_top''jar_sep''jar_low']">
      <div className="[grid-area:jar]">
        <JarRuler
          fillMm={fill}
          topMm={entry.heightOf(top)}
          bottomMm={entry.heightOf(bottom)}
          lastTopMm={last('top')}
          lastBottomMm={last('bottom')}
          onTop={(value) => entry.setHeight(top, value)}
          onBottom={(value) => entry.setHeight(bottom, value)}
        />
      </div>
      <div className="[grid-area:top]">
        <Layer entry={entry} tab={top} />
      </div>
      <div aria-live="polite" className="min-w-0 [grid-area:sep]">
        <p className="flex flex-wrap items-baseline justify-between gap-x-3">
          <b className="text-18">Separation</b>
          <span className="text-17">{bandText(slot.field)}</span>
        </p>
        <div className="flex flex-wrap items-center justify-between gap-x-4">
          <p
            className={`whitespace-nowrap text-44 font-700 leading-none sm:text-64 ${isOut ? 'text-alarm' : ''}`}
          >
            {verdict?.state === 'value' ? (
              <FigureDetails
                figure={`${verdict.value.toFixed(1)} %`}
                facts={() => layersFacts(verdict.value, fill, entry.heightOf(top), entry.heightOf(bottom))}
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
          <button
            type="button"
            onClick={() => entry.goTo('photo')}
            className="min-h-16 whitespace-nowrap text-17 underline underline-offset-4 beside:order-last"
          >
            {entry.draft.onPhoto?.[`${slot.field.attribute}.1`]
              ? 'Measured on the photo'
              : 'Measure on a photo'}
          </button>
          {verdict?.state === 'value' ? (
            <p className={`flex items-end gap-3 text-24 font-650 sm:text-30 ${isOut ? 'text-alarm' : ''}`}>
              <StandingMark standing={isOut ? 'out' : 'steady'} size={34} />
              <span className="hidden sm:inline">{isOut ? 'out' : 'inside'}</span>
            </p>
          ) : null}
        </div>
        <FieldBand
          field={slot.field}
          now={verdict?.state === 'value' ? verdict.value : null}
          width={380}
          isQuiet
        />
      </div>
      <div className="[grid-area:low]">
        <Layer entry={entry} tab={bottom} />
      </div>
    </div>
  )
}

function Layer({ entry, tab }: { entry: JarEntry; tab: FieldTab }) {
  const isHere = entry.at === tab.key
  return (
    <div className="flex items-center justify-between gap-3 beside:flex-wrap">
      <button
        type="button"
        onClick={() => entry.goTo(tab.key)}
        aria-pressed={isHere}
        className={`min-h-16 min-w-0 rounded border-b-[3px] text-left ${isHere ? 'border-ink' : 'border-transparent'}`}
      >
        <b className="block text-18">{slotLabel(tab.slot)}</b>
        <span className="text-36 font-650 leading-none sm:text-50">{tab.text === '' ? '–' : tab.text}</span>
        <span className="text-20 sm:text-30"> mm</span>
        <LastValues field={tab.slot.field} part={tab.slot.part!} />
      </button>
      <div className="flex gap-3">
        <StepButton tab={tab} sign="minus" onPress={() => entry.stepHeight(tab, -0.1)} />
        <StepButton tab={tab} sign="plus" onPress={() => entry.stepHeight(tab, 0.1)} />
      </div>
    </div>
  )
}

type StepProps = { tab: FieldTab; sign: 'plus' | 'minus'; onPress: () => void }

export function StepButton({ tab, sign, onPress }: StepProps) {
  return (
    <button
      type="button"
      aria-label={`${slotLabel(tab.slot)}: 0.1 mm ${sign === 'plus' ? 'more' : 'less'}`}
      onClick={onPress}
      className="flex size-16 shrink-0 flex-col items-center justify-center rounded border-2 border-rule bg-paper active:bg-recess sm:size-[72px]"
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
