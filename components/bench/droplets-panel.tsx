import { Suspense, useState } from 'react'
import type { PanelProps } from '@/components/bench/kind-panel'
import { PanelHead } from '@/components/bench/panel-head'
import { FieldBand } from '@/components/bench/field-band'
import { DropsOnPhoto } from '@/components/photo/later'
import { Button } from '@/components/ui/button'
import { ComingDialog } from '@/components/ui/coming'
import { TextArea } from '@/components/ui/text-area'
import { dropCount, dropsOf, readDrops } from '@/lib/batch/rules/droplets'
import { dropletMeasureWords } from '@/lib/protocol/rules/words'

/** Diameters typed or pasted, one for each drop or with how many there were, and what they come to. */
export function DropletsPanel({ jar, slot, text, verdict, type, onPhoto, markOnPhoto }: PanelProps) {
  const [isPhoto, setPhoto] = useState(false)
  const counted = text.trim() === '' ? null : readDrops(text)
  const drops = counted === null || typeof counted === 'string' ? null : dropsOf(counted)
  const measure = slot.field.planned.dropletMeasure ?? 'd50v'
  return (
    <div className="grid gap-4">
      <PanelHead slot={slot} />
      <TextArea
        label="Diameters, micrometres"
        density="bench"
        rows={4}
        value={text}
        onText={(typed) => type(slot.key, typed)}
        hint="One for each drop, or with how many there were: 2.5 × 12; 3.5 × 30; 4.1"
        error={verdict.state === 'impossible' ? verdict.sentence : undefined}
      />
      <Button density="bench" className="justify-self-start" onClick={() => setPhoto(true)}>
        {onPhoto ? 'Measured on a photo. Measure again' : 'Measure on a microscope photo'}
      </Button>
      <p aria-live="polite" className="min-h-9">
        {verdict.state === 'value' ? (
          <span className={`text-30 font-650 ${verdict.isOut ? 'text-alarm' : ''}`}>
            {verdict.value.toFixed(2)} micrometres
          </span>
        ) : null}
        {drops ? (
          <span className="block text-17">
            {dropletMeasureWords[measure]} of {dropCount(drops)} drops. D[3,2] {drops.d32.toFixed(2)}, D[4,3]{' '}
            {drops.d43.toFixed(2)}, span {drops.span.toFixed(2)}.
          </span>
        ) : null}
      </p>
      <FieldBand field={slot.field} now={verdict.state === 'value' ? verdict.value : null} width={440} />
      <Suspense
        fallback={
          <ComingDialog
            what="What measures drops on a photo"
            title="Drops on a photo"
            density="bench"
            onClose={() => setPhoto(false)}
          />
        }
      >
        {isPhoto ? (
          <DropsOnPhoto
            jar={jar}
            onUse={(diametersUm, photoDrops) => {
              type(slot.key, diametersUm.map((um) => Number(um.toPrecision(4))).join('; '))
              markOnPhoto(slot, { photoDrops })
              setPhoto(false)
            }}
            onClose={() => setPhoto(false)}
          />
        ) : null}
      </Suspense>
    </div>
  )
}
