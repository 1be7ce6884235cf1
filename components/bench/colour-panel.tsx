import { Suspense, useState } from 'react'
import { besideKey } from '@/components/bench/kind-entry'
import type { PanelProps } from '@/components/bench/kind-panel'
import { PanelHead } from '@/components/bench/panel-head'
import { FieldBand } from '@/components/bench/field-band'
import { ColourOnPhoto } from '@/components/photo/later'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { ComingDialog } from '@/components/ui/coming'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import { labIn } from '@/lib/reading/rules/colour-value'
import { readTyped } from '@/lib/reading/schema/typed'

const parts = ['L*', 'a*', 'b*'] as const
const blank = '?'

/** L*, a* and b* from the colorimeter, and how far that lies from the batch's own initial. */
export function ColourPanel({ jar, slot, text, verdict, read, type, onPhoto, markOnPhoto }: PanelProps) {
  const [isPhoto, setPhoto] = useState(false)
  const [at, setAt] = useState(0)
  const typed = text.split(' ')
  const values = parts.map((_, index) => (typed[index] === blank ? '' : (typed[index] ?? '')))
  const estimateKey = besideKey(slot, 'estimate')
  const initial = labIn(slot.field.initialDetail?.['lab'])
  function set(index: number, value: string) {
    const next = values.map((one, other) => (other === index ? value.replace(/\s/g, '') : one))
    type(slot.key, next.every((one) => one === '') ? '' : next.map((one) => one || blank).join(' '))
  }
  const isWhole = values.every((one) => readTyped(one) !== null)
  return (
    <div className="grid gap-x-7 gap-y-4 sm:grid-cols-[minmax(0,1fr)_300px]">
      <div className="grid content-start gap-4">
        <PanelHead slot={slot} />
        <div className="grid grid-cols-3 gap-3">
          {parts.map((part, index) => (
            <label key={part} className="grid gap-1">
              <b className="text-18">{part}</b>
              <input
                value={values[index]}
                inputMode="none"
                autoComplete="off"
                onFocus={() => setAt(index)}
                onChange={(event) => set(index, event.target.value)}
                className={`w-full min-w-0 border-0 bg-transparent p-0 text-36 font-650 outline-none sm:text-50 ${at === index ? 'border-b-[5px] border-ink' : 'border-b-[3px] border-rule'}`}
              />
              <span className="text-17 text-soft">
                {initial ? `initial ${[initial.L, initial.a, initial.b][index]!.toFixed(1)}` : ' '}
              </span>
            </label>
          ))}
        </div>
        <p aria-live="polite" className="min-h-9">
          {verdict.state === 'value' ? (
            <span className={`text-30 font-650 ${verdict.isOut ? 'text-alarm' : ''}`}>
              {verdict.value.toFixed(1)} from the initial
            </span>
          ) : null}
          {verdict.state === 'impossible' && (isWhole || !initial) ? (
            <span className="font-700 text-alarm">{verdict.sentence}</span>
          ) : null}
        </p>
      </div>
      <div className="sm:col-start-2 sm:row-span-2 sm:row-start-1">
        <NumberPad onKey={(key) => set(at, afterKey(values[at] ?? '', key))}>
          <div className="grid grid-cols-2 gap-3">
            <PadKey
              label="Minus"
              shown="−"
              onPress={() => {
                const now = values[at] ?? ''
                set(at, now.startsWith('-') ? now.slice(1) : `-${now}`)
              }}
            />
            <PadKey
              label="The next of the three numbers"
              shown="next"
              onPress={() => setAt((at + 1) % parts.length)}
            />
          </div>
        </NumberPad>
      </div>
      <div className="grid content-start gap-4">
        <FieldBand field={slot.field} now={verdict.state === 'value' ? verdict.value : null} width={440} />
        <Button density="bench" onClick={() => setPhoto(true)}>
          {onPhoto ? 'From a photo. Measure it again' : 'From a photo with a grey card'}
        </Button>
        <Checkbox
          label="An estimate, from a photo or by eye"
          density="bench"
          checked={read(estimateKey) !== ''}
          onSet={(isOn) => type(estimateKey, isOn ? 'yes' : '')}
        />
      </div>
      <Suspense
        fallback={
          <ComingDialog
            what="What tells a colour from a photo"
            title="Colour from a photo"
            density="bench"
            onClose={() => setPhoto(false)}
          />
        }
      >
        {isPhoto ? (
          <ColourOnPhoto
            jar={jar}
            onUse={({ L, a, b }, photoColour) => {
              type(slot.key, [L, a, b].map((part) => part.toFixed(1)).join(' '))
              type(estimateKey, 'yes')
              markOnPhoto(slot, { photoColour })
              setPhoto(false)
            }}
            onClose={() => setPhoto(false)}
          />
        ) : null}
      </Suspense>
    </div>
  )
}

function PadKey({ label, shown, onPress }: { label: string; shown: string; onPress: () => void }) {
  return (
    <button
      type="button"
      aria-label={label}
      onPointerDown={(event) => event.preventDefault()}
      onClick={onPress}
      className="h-16 rounded border-2 border-rule bg-ground text-24 font-600 active:bg-recess"
    >
      {shown}
    </button>
  )
}
