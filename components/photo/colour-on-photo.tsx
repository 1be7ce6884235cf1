'use client'

import { useEffect, useMemo, useState, type KeyboardEvent } from 'react'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { readTyped } from '@/lib/reading/schema/typed'
import type { PhotoColourOfReading } from '@/lib/reading/schema/photo-colour'
import type { Lab } from '@/lib/science/colour'
import { ScienceError } from '@/lib/science/guard'
import { patchOf, type Square } from '@/lib/science/patch'
import { colourByGrey } from '@/lib/science/photo-colour'
import { useGreyCard } from './grey-card'
import { MarkDialog, type MarkedPhoto, type OpenCopy } from './mark-dialog'
import { MarkTable } from './mark-table'
import { LoupeCross, MarkPicture, type Place } from './mark-picture'
import { MovePad, moveOfKey, Nudge } from './nudge'
import { PhotoSquares } from './photo-squares'
import { readPixels } from './read-pixels'

type Patches = { grey: Square; sample: Square }
type Which = keyof Patches
const names: Record<Which, string> = { grey: 'Grey card', sample: 'Sample' }

type Props = {
  jar: BenchJarPage
  onUse: (lab: Lab, photoColour: PhotoColourOfReading) => void
  onClose: () => void
}

/** L*a*b* of a sample beside a grey card: two patches on a photo, an estimate in any case. */
export default function ColourOnPhoto({ jar, onUse, onClose }: Props) {
  return (
    <MarkDialog
      jar={jar}
      shows="colour"
      title="Colour from a photo"
      ask="The sample and a grey card side by side, flat, in one even light, without shadow or gloss. It gives an estimate: a camera is no colorimeter."
      onClose={onClose}
    >
      {(photo) => <Patching {...{ ...photo, onUse }} />}
    </MarkDialog>
  )
}

type PatchingProps = MarkedPhoto & Pick<Props, 'onUse'>

function Patching({ photoId, copy, frame, onUse }: PatchingProps) {
  const { width, height } = copy
  const [patches, setPatches] = useState<Patches>(() => firstPatches(width, height))
  const [picked, setPicked] = useState<Which>('grey')
  const [touched, setTouched] = useState<Which[]>([])
  const [finger, setFinger] = useState<Place | null>(null)
  const card = useGreyCard()
  const pixels = usePixels(copy)
  const greyL = readTyped(card.text)
  const read = useMemo(() => (pixels ? colourOf(pixels, patches, greyL) : null), [pixels, patches, greyL])

  function set(which: Which, square: Square) {
    const side = Math.round(Math.max(8, Math.min(square.side, width, height)))
    const within = (value: number, most: number) =>
      Math.round(Math.max(side / 2 + 1, Math.min(most - side / 2 - 1, value)))
    setPatches((all) => ({
      ...all,
      [which]: { side, x: within(square.x, width), y: within(square.y, height) },
    }))
    setTouched((all) => (all.includes(which) ? all : [...all, which]))
  }
  const move = (dx: number, dy: number) =>
    set(picked, { ...patches[picked], x: patches[picked].x + dx, y: patches[picked].y + dy })
  const resize = (by: number) =>
    set(picked, { ...patches[picked], side: Math.round(patches[picked].side * by) })

  function onKey(event: KeyboardEvent) {
    const by = moveOfKey(event)
    const size = { '+': 1.25, '=': 1.25, '-': 0.8 }[event.key]
    if (!by && size === undefined) return
    event.preventDefault()
    if (by) move(by.dx, by.dy)
    else resize(size!)
  }

  function onDown(place: Place) {
    const inside = (Object.keys(patches) as Which[]).find((which) => isIn(patches[which], place))
    const which = inside ?? picked
    setPicked(which)
    setFinger(place)
    // Pressed where it lies, it stays there.
    set(which, inside ? patches[which] : { ...patches[which], ...place })
  }

  const open = (['grey', 'sample'] as const).filter((which) => !touched.includes(which))
  const lab = read && 'lab' in read ? read.lab : null
  return (
    <MarkTable
      {...frame}
      picture={
        <MarkPicture
          copy={copy}
          finger={finger}
          at={finger ?? patches[picked]}
          cursor="cursor-move"
          loupeMark={<LoupeCross />}
          onDown={onDown}
          onDrag={(place) => {
            setFinger(place)
            set(picked, { ...patches[picked], ...place })
          }}
          onUp={() => setFinger(null)}
        >
          <PhotoSquares
            src={copy.url}
            alt="The photo with the patches on grey card and sample"
            {...{ width, height }}
            squares={(['grey', 'sample'] as const).map((which) => ({
              name: names[which],
              square: patches[which],
              isPicked: picked === which,
            }))}
          />
        </MarkPicture>
      }
      tools={
        <>
          <div role="group" aria-label="Patches" className="grid grid-cols-2 gap-3">
            {(['grey', 'sample'] as const).map((which) => (
              <button
                key={which}
                type="button"
                aria-pressed={picked === which}
                onClick={() => setPicked(which)}
                onFocus={() => setPicked(which)}
                onKeyDown={onKey}
                className={`min-h-16 rounded px-4 py-1 text-left ${picked === which ? 'border-[3px] border-ink bg-typed' : 'border-2 border-rule bg-paper'}`}
              >
                <b className="block text-18">{names[which]}</b>
                <span className="text-17">
                  {patches[which].x} across, {patches[which].y} down, {patches[which].side} wide
                </span>
              </button>
            ))}
          </div>
          <MovePad name={names[picked]} onMove={move} />
          <div className="grid grid-cols-2 gap-3">
            <Nudge label="smaller" says={`${names[picked]} smaller`} onPress={() => resize(0.8)} />
            <Nudge label="larger" says={`${names[picked]} larger`} onPress={() => resize(1.25)} />
          </div>
          <Field
            label="L* of the grey card"
            density="bench"
            inputMode="decimal"
            value={card.text}
            onText={card.type}
            hint={card.origin}
          />
          <div aria-live="polite">
            {read && 'reasons' in read
              ? read.reasons.map((reason) => (
                  <p key={reason} className="text-17">
                    {reason}
                  </p>
                ))
              : null}
          </div>
          <p className="text-17 text-soft">
            Press the place on the photo and drag, or use the buttons; arrow keys move the patch, plus and
            minus size it.
          </p>
        </>
      }
      told={
        lab && read && 'reasons' in read ? (
          <p>
            <span className="block text-17">
              {read.reasons.length > 0 ? 'Not sure. Better take it again.' : 'Estimate, L* a* b*'}
            </span>
            <b className="text-30 font-650 leading-none">{shownLab(lab)}</b>
          </p>
        ) : null
      }
      act={
        <Button
          density="bench"
          kind="primary"
          {...whyOff(open, read)}
          onClick={() => {
            if (!pixels || !lab || greyL === null) return
            const { grey, sample } = patches
            card.keep()
            onUse(lab, {
              ...{ photoId, width, height, greyL, grey, sample, readBy: 'device' },
              patches: { grey: patchOf(pixels, grey), sample: patchOf(pixels, sample) },
            })
          }}
        >
          Use this estimate
        </Button>
      }
    />
  )
}

type Read = ReturnType<typeof colourOf>

function whyOff(open: Which[], read: Read | null): { why?: string } {
  if (open.length > 0)
    return {
      why: `Put the patch on the ${open.map((which) => names[which].toLowerCase()).join(', and one on the ')}.`,
    }
  if (read === null) return { why: 'The photo is being read.' }
  return 'refused' in read ? { why: read.refused } : {}
}

const shownLab = ({ L, a, b }: Lab) => [L, a, b].map((part) => part.toFixed(1)).join(' ')

/** Side by side in the middle, until a hand puts them where they belong. */
function firstPatches(width: number, height: number): Patches {
  const side = Math.round(Math.min(width, height) / 9)
  const [y, left, right] = [0.5 * height, 0.3 * width, 0.7 * width].map(Math.round) as [
    number,
    number,
    number,
  ]
  return { grey: { x: left, y, side }, sample: { x: right, y, side } }
}

function isIn({ x, y, side }: Square, place: Place): boolean {
  return Math.max(Math.abs(place.x - x), Math.abs(place.y - y)) <= side / 2
}

function usePixels(copy: OpenCopy): ImageData | null {
  const [pixels, setPixels] = useState<ImageData | null>(null)
  useEffect(() => {
    let isOver = false
    void readPixels(copy).then((read) => (isOver ? undefined : setPixels(read)))
    return () => {
      isOver = true
    }
  }, [copy])
  return pixels
}

function colourOf(pixels: ImageData, { grey, sample }: Patches, greyL: number | null) {
  if (greyL === null) return { refused: 'Give the L* of the grey card, such as 49.5.' }
  const apart = Math.max(Math.abs(grey.x - sample.x), Math.abs(grey.y - sample.y))
  if (apart < (grey.side + sample.side) / 2)
    return { refused: 'The two patches lie over one another. Move one away.' }
  try {
    return colourByGrey({ grey: patchOf(pixels, grey), sample: patchOf(pixels, sample), greyL })
  } catch (thrown) {
    if (!(thrown instanceof ScienceError)) throw thrown
    return { refused: thrown.message.slice(thrown.field.length + 2) }
  }
}
