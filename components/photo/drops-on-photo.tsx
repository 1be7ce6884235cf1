'use client'

import { useState, type KeyboardEvent } from 'react'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { dropsOf } from '@/lib/batch/rules/droplets'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { mostDropsOnPhoto, type PhotoDropsOfReading } from '@/lib/reading/schema/photo-drops'
import { readTyped } from '@/lib/reading/schema/typed'
import { diametersOnPhoto, lengthOf, shortestBarPx, type Stretch } from '@/lib/science/photo-drops'
import { MarkDialog, type MarkedPhoto } from './mark-dialog'
import { LoupeCross, MarkPicture, type Place } from './mark-picture'
import { MarkTable } from './mark-table'
import { MovePad, moveOfKey } from './nudge'
import { PhotoDrops } from './photo-drops'

type Props = {
  jar: BenchJarPage
  onUse: (diametersUm: number[], photoDrops: PhotoDropsOfReading) => void
  onClose: () => void
}

/** Diameters of drops on a microscope photo: the ends of its scale bar first, then two across each drop. */
export default function DropsOnPhoto({ jar, onUse, onClose }: Props) {
  return (
    <MarkDialog
      jar={jar}
      shows="droplets"
      title="Drops on a photo"
      ask="A microscope photo that shows its scale bar. Measure every drop of a field, small ones too, else the mean is too large."
      onClose={onClose}
    >
      {(photo) => <Measuring {...{ ...photo, onUse }} />}
    </MarkDialog>
  )
}

type MeasuringProps = MarkedPhoto & Pick<Props, 'onUse'>

function Measuring({ photoId, copy, frame, onUse }: MeasuringProps) {
  const { width, height } = copy
  const [bar, setBar] = useState<Stretch | null>(null)
  const [umText, setUmText] = useState('')
  const [drops, setDrops] = useState<Stretch[]>([])
  const [pending, setPending] = useState<Place | null>(null)
  const [cross, setCross] = useState<Place>({ x: Math.round(width / 2), y: Math.round(height / 2) })
  const [finger, setFinger] = useState<Place | null>(null)
  const um = readTyped(umText)
  const isBarShort = bar !== null && lengthOf(bar) < shortestBarPx
  const isScaled = bar !== null && !isBarShort && um !== null && um > 0
  const diameters = isScaled ? diametersOnPhoto({ ...bar, um }, drops) : []
  const means =
    diameters.length > 1 ? dropsOf({ diametersUm: diameters, counts: diameters.map(() => 1) }) : null

  const within = ({ x, y }: Place): Place => ({
    x: Math.round(Math.max(0, Math.min(width, x)) * 10) / 10,
    y: Math.round(Math.max(0, Math.min(height, y)) * 10) / 10,
  })

  /** The first end waits; with the second there is a bar, or one drop more. */
  function setPoint(place: Place) {
    const at = within(place)
    setCross(at)
    if (!pending) return setPending(at)
    const stretch = { x1: pending.x, y1: pending.y, x2: at.x, y2: at.y }
    if (lengthOf(stretch) < 1) return
    setPending(null)
    if (bar === null || isBarShort) setBar(stretch)
    else if (drops.length < mostDropsOnPhoto) setDrops((all) => [...all, stretch])
  }

  function undo() {
    if (pending) setPending(null)
    else if (drops.length > 0) setDrops((all) => all.slice(0, -1))
    else setBar(null)
  }

  const move = (dx: number, dy: number) => setCross((at) => within({ x: at.x + dx, y: at.y + dy }))
  function onKey(event: KeyboardEvent) {
    const by = moveOfKey(event)
    if (!by && event.key !== 'Backspace') return
    event.preventDefault()
    if (by) move(by.dx, by.dy)
    else undo()
  }

  return (
    <MarkTable
      {...frame}
      picture={
        <MarkPicture
          copy={copy}
          finger={finger}
          at={finger ?? cross}
          cursor="cursor-crosshair"
          loupeMark={<LoupeCross />}
          onDown={setFinger}
          onDrag={setFinger}
          onUp={() => {
            if (finger) setPoint(finger)
            setFinger(null)
          }}
        >
          <PhotoDrops
            src={copy.url}
            alt="The photo with its scale bar and the drops that are measured"
            {...{ width, height, bar, drops, pending }}
            cross={finger ?? cross}
          />
        </MarkPicture>
      }
      tools={
        <>
          <p role="status" className="text-22 font-650">
            {nextStep(bar !== null && !isBarShort, isScaled, pending !== null, drops.length)}
          </p>
          {isBarShort ? (
            <p className="font-700 text-alarm">
              The scale bar is too short. Set its ends apart, or take a larger photo.
            </p>
          ) : null}
          <Field
            label="Scale bar, micrometres"
            density="bench"
            inputMode="decimal"
            value={umText}
            onText={setUmText}
          />
          <div className="grid gap-3">
            <button
              type="button"
              onKeyDown={onKey}
              onClick={() => setPoint(cross)}
              className="min-h-16 rounded border-2 border-rule bg-paper px-4 text-18 font-600 focus:border-[3px] focus:border-ink"
            >
              Set a point at the cross
              <span className="sr-only">
                , {Math.round(cross.x)} across, {Math.round(cross.y)} down
              </span>
            </button>
            <MovePad name="Cross" onMove={move} />
            <p className="text-17 text-soft">
              Press and let go where the loupe shows the edge. By keys: arrows move the cross, Enter sets the
              point, Backspace takes it back.
            </p>
          </div>
          <Button density="bench" onClick={undo} {...(bar || pending ? {} : { why: 'Nothing is set yet.' })}>
            Take the last one back
          </Button>
          <ol aria-label="Diameters">
            {drops.map((_, index) => (
              <li
                key={index}
                className="flex min-h-16 items-center justify-between gap-3 border-b border-hair"
              >
                <span className="text-18">
                  {index + 1}.{' '}
                  {diameters[index] === undefined
                    ? 'waits for the scale'
                    : `${shownUm(diameters[index])} micrometres`}
                </span>
                <button
                  type="button"
                  aria-label={`Delete drop ${index + 1}`}
                  onClick={() => setDrops((all) => all.filter((__, other) => other !== index))}
                  className="min-h-16 px-3 text-17 underline underline-offset-4"
                >
                  Delete
                </button>
              </li>
            ))}
          </ol>
        </>
      }
      told={
        means ? (
          <p>
            <span className="block text-17">
              D[3,2] of {diameters.length} drops
              <span className="max-sm:hidden">
                , D[4,3] {means.d43.toFixed(2)}, span {means.span.toFixed(2)}
              </span>
            </span>
            <b className="text-30 font-650 leading-none">{means.d32.toFixed(2)}</b> micrometres
          </p>
        ) : null
      }
      act={
        <Button
          density="bench"
          kind="primary"
          {...(!isScaled
            ? { why: 'Set the scale bar and its length first.' }
            : drops.length === 0
              ? { why: 'Measure at least one drop.' }
              : {})}
          onClick={() => {
            if (bar && um !== null && isScaled)
              onUse(diameters, { photoId, width, height, bar: { ...bar, um }, drops })
          }}
        >
          Use these {drops.length === 1 ? 'drop' : 'drops'}
        </Button>
      }
    />
  )
}

const shownUm = (um: number) => String(Number(um.toPrecision(4)))

function nextStep(hasBar: boolean, isScaled: boolean, isPending: boolean, count: number): string {
  if (!hasBar) return isPending ? 'Now the other end of the scale bar.' : 'Press one end of the scale bar.'
  if (!isScaled) return 'Type how long the scale bar is.'
  if (isPending) return 'Now the other side of the drop.'
  return count === 0 ? 'Press one side of a drop, then the other.' : 'The next drop, or use them.'
}
