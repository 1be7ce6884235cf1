'use client'

import { useRef, useState, type PointerEvent } from 'react'
import type { PhotoLines } from '@/lib/science/photo-lines'
import { nearestLine, type Line } from './lines'
import { PhotoWithLines } from './photo-with-lines'

type Props = {
  copy: { url: string; width: number; height: number }
  alt: string
  lines: PhotoLines
  axisX: number
  tiltDegrees: number
  picked: Line
  onPick: (line: Line) => void
  onMove: (line: Line, row: number) => void
}

const loupePx = 140
/** CSS pixels for one pixel of the copy. */
const zoom = 2.5

/** The photo under its lines. The finger drags from beside the line, so that it covers nothing; a loupe shows the place. */
export function DragPicture({ copy, alt, lines, axisX, tiltDegrees, picked, onPick, onMove }: Props) {
  const box = useRef<HTMLDivElement>(null)
  const held = useRef<{ line: Line; offset: number } | null>(null)
  const [finger, setFinger] = useState<{ x: number; y: number } | null>(null)
  const slope = Math.tan((tiltDegrees * Math.PI) / 180)

  /** Where a pointer lies in the copy; `row` is where its leaning line crosses the jar's axis. */
  function place(event: PointerEvent) {
    const { left, top, width, height } = box.current!.getBoundingClientRect()
    const x = ((event.clientX - left) / width) * copy.width
    const y = ((event.clientY - top) / height) * copy.height
    return { x, y, row: y + (x - axisX) * slope }
  }

  function onDown(event: PointerEvent<HTMLDivElement>) {
    event.currentTarget.setPointerCapture(event.pointerId)
    const { x, y, row } = place(event)
    const line = nearestLine(lines, row)
    held.current = { line, offset: lines[line] - row }
    setFinger({ x, y })
    onPick(line)
  }

  function onDrag(event: PointerEvent<HTMLDivElement>) {
    if (!held.current) return
    const { x, y, row } = place(event)
    setFinger({ x, y })
    onMove(held.current.line, row + held.current.offset)
  }

  function onUp() {
    held.current = null
    setFinger(null)
  }

  const x = finger?.x ?? axisX
  const y = lines[picked] - (x - axisX) * slope
  const isRight = finger ? finger.x < copy.width / 2 : true
  const isLow = y < copy.height * 0.4
  return (
    <div
      ref={box}
      className="relative mx-auto cursor-ns-resize touch-none overflow-hidden border-2 border-ink"
      style={{
        width: `min(100%, ${(62 * copy.width) / copy.height}dvh)`,
        aspectRatio: `${copy.width} / ${copy.height}`,
      }}
      onPointerDown={onDown}
      onPointerMove={onDrag}
      onPointerUp={onUp}
      onPointerCancel={onUp}
    >
      <PhotoWithLines
        {...{ alt, lines, axisX, tiltDegrees, picked, src: copy.url, width: copy.width, height: copy.height }}
      />
      <div
        aria-hidden
        className={`pointer-events-none absolute overflow-hidden rounded-full border-[3px] border-ink bg-ink ${isRight ? 'right-2' : 'left-2'} ${isLow ? 'bottom-2' : 'top-2'}`}
        style={{
          width: loupePx,
          height: loupePx,
          backgroundImage: `url(${copy.url})`,
          backgroundRepeat: 'no-repeat',
          backgroundSize: `${copy.width * zoom}px ${copy.height * zoom}px`,
          backgroundPosition: `${loupePx / 2 - 3 - x * zoom}px ${loupePx / 2 - 3 - y * zoom}px`,
        }}
      >
        <span
          className="absolute inset-x-0 block border-t border-ink outline outline-1 outline-white"
          style={{ top: loupePx / 2 - 3, transform: `rotate(${-tiltDegrees}deg)` }}
        />
      </div>
    </div>
  )
}
