'use client'

import { useRef, useState } from 'react'
import type { PhotoLines } from '@/lib/science/photo-lines'
import { nearestLine, type Line } from './lines'
import { loupePx, MarkPicture, type Place } from './mark-picture'
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

/** The photo under its lines. The finger drags from beside the line, so that it covers nothing; a loupe shows the place. */
export function DragPicture({ copy, alt, lines, axisX, tiltDegrees, picked, onPick, onMove }: Props) {
  const held = useRef<{ line: Line; offset: number } | null>(null)
  const [finger, setFinger] = useState<Place | null>(null)
  const slope = Math.tan((tiltDegrees * Math.PI) / 180)
  /** Where the leaning line through a place crosses the jar's axis. */
  const rowOf = ({ x, y }: Place) => y + (x - axisX) * slope

  function onDown(place: Place) {
    const row = rowOf(place)
    const line = nearestLine(lines, row)
    held.current = { line, offset: lines[line] - row }
    setFinger(place)
    onPick(line)
  }

  function onDrag(place: Place) {
    if (!held.current) return
    setFinger(place)
    onMove(held.current.line, rowOf(place) + held.current.offset)
  }

  function onUp() {
    held.current = null
    setFinger(null)
  }

  const x = finger?.x ?? axisX
  return (
    <MarkPicture
      {...{ copy, finger, onDown, onDrag, onUp }}
      at={{ x, y: lines[picked] - (x - axisX) * slope }}
      cursor="cursor-ns-resize"
      loupeMark={
        <span
          className="absolute inset-x-0 block border-t border-[#0E1D17] outline outline-1 outline-white"
          style={{ top: loupePx / 2 - 3, transform: `rotate(${-tiltDegrees}deg)` }}
        />
      }
    >
      <PhotoWithLines
        {...{ alt, lines, axisX, tiltDegrees, picked, src: copy.url, width: copy.width, height: copy.height }}
      />
    </MarkPicture>
  )
}
