'use client'

import { useRef, type PointerEvent } from 'react'
import { Drawn } from '@/components/marks/drawn'
import type { Point, Shape } from '@/components/marks/shape'
import { dots, stripes } from '@/components/marks/texture'

type Props = {
  fillMm: number
  topMm: number
  bottomMm: number
  lastTopMm: number | null
  lastBottomMm: number | null
  onTop: (mm: number) => void
  onBottom: (mm: number) => void
}

const glass = { left: 92, right: 332, top: 12, bottom: 410 }
const view = { width: 380, height: 424 }

/** The jar with a millimetre ruler. Each layer has a handle to drag; the buttons beside it do the same. */
export function JarRuler({ fillMm, topMm, bottomMm, lastTopMm, lastBottomMm, onTop, onBottom }: Props) {
  const svg = useRef<SVGSVGElement>(null)
  const scale = (glass.bottom - glass.top - 24) / fillMm
  const y = (mm: number) => glass.bottom - mm * scale
  const surface = y(fillMm)
  const oilEdge = y(fillMm - Math.min(topMm, fillMm))
  const waterEdge = y(Math.min(bottomMm, fillMm))

  function drag(set: (mm: number) => void, isTop: boolean) {
    return (event: PointerEvent<SVGGElement>) => {
      if (event.type === 'pointerdown') event.currentTarget.setPointerCapture(event.pointerId)
      if (!event.currentTarget.hasPointerCapture(event.pointerId) || !svg.current) return
      const box = svg.current.getBoundingClientRect()
      const at = ((event.clientY - box.top) / box.height) * view.height
      const mm = (glass.bottom - at) / scale
      set(Math.round((isTop ? fillMm - mm : mm) * 10) / 10)
    }
  }

  return (
    <svg
      ref={svg}
      viewBox={`0 0 ${view.width} ${view.height}`}
      className="mx-auto max-h-[46dvh] w-full touch-none select-none sm:max-h-[350px]"
      role="img"
      aria-label={`The jar: fill ${fillMm} mm, oil on top ${topMm.toFixed(1)} mm, water below ${bottomMm.toFixed(1)} mm`}
    >
      <Ruler fillMm={fillMm} y={y} />
      <rect
        x={glass.left}
        y={surface}
        width={glass.right - glass.left}
        height={glass.bottom - surface}
        fill="var(--cream)"
      />
      <Drawn shapes={layerShapes(oilEdge, waterEdge, surface, topMm > 0, bottomMm > 0)} />
      <Was at={lastTopMm === null ? null : y(fillMm - lastTopMm)} />
      <Was at={lastBottomMm === null ? null : y(lastBottomMm)} />
      <path
        d={`M${glass.left} ${glass.top}V${glass.bottom - 14}Q${glass.left} ${glass.bottom} ${glass.left + 14} ${glass.bottom}H${glass.right - 14}Q${glass.right} ${glass.bottom} ${glass.right} ${glass.bottom - 14}V${glass.top}`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="5"
      />
      <path
        d={`M${glass.left - 10} ${glass.top}h20M${glass.right - 10} ${glass.top}h20`}
        stroke="var(--ink)"
        strokeWidth="6"
        strokeLinecap="round"
      />
      {waterEdge - oilEdge > 60 ? (
        <g style={{ color: 'var(--dot)' }} textAnchor="middle" fontSize="18">
          <text x="212" y={(oilEdge + waterEdge) / 2 - 6}>
            emulsion
          </text>
          <text x="212" y={(oilEdge + waterEdge) / 2 + 18} fontWeight="700">
            {Math.max(0, fillMm - topMm - bottomMm).toFixed(1)} mm
          </text>
        </g>
      ) : null}
      <Handle at={oilEdge} onPointer={drag(onTop, true)} />
      <Handle at={waterEdge} onPointer={drag(onBottom, false)} />
    </svg>
  )
}

function layerShapes(
  oilEdge: number,
  waterEdge: number,
  surface: number,
  hasOil: boolean,
  hasWater: boolean,
): Shape[] {
  const { left, right, bottom } = glass
  const shapes: Shape[] = []
  if (hasOil) {
    shapes.push({ kind: 'rect', x: left, y: surface, w: right - left, h: oilEdge - surface, fill: 'oil' })
    if (oilEdge - surface > 8)
      shapes.push({
        kind: 'path',
        steps: dots({ left, right, top: surface, bottom: oilEdge }, 9, 1.35),
        fill: 'dot',
      })
  }
  if (hasWater) {
    const outline: Point[] = [
      [left, waterEdge],
      [right, waterEdge],
      [right, bottom],
      [left, bottom],
    ]
    shapes.push({
      kind: 'rect',
      x: left,
      y: waterEdge,
      w: right - left,
      h: bottom - waterEdge,
      fill: 'water',
    })
    shapes.push({ kind: 'path', steps: stripes(outline, 8, 2.2, 'rising'), fill: 'cream' })
  }
  return shapes
}

function Ruler({ fillMm, y }: { fillMm: number; y: (mm: number) => number }) {
  const marks = Array.from({ length: Math.floor(fillMm) + 1 }, (_, mm) => mm)
  return (
    <g>
      {marks.map((mm) => (
        <line
          key={mm}
          x1={78}
          x2={78 - (mm % 10 === 0 ? 18 : mm % 5 === 0 ? 12 : 7)}
          y1={y(mm)}
          y2={y(mm)}
          stroke="var(--ink)"
          strokeWidth={mm % 10 === 0 ? 2 : 1}
        />
      ))}
      {marks
        .filter((mm) => mm % 10 === 0)
        .map((mm) => (
          <text key={mm} x={50} y={y(mm) + 6} fontSize="17" textAnchor="end">
            {mm}
          </text>
        ))}
      <text x={50} y={14} fontSize="17" textAnchor="end">
        mm
      </text>
    </g>
  )
}

function Was({ at }: { at: number | null }) {
  if (at === null) return null
  return (
    <line
      x1={glass.left}
      x2={glass.right}
      y1={at}
      y2={at}
      stroke="var(--dot)"
      strokeWidth="1.5"
      strokeDasharray="3 4"
    />
  )
}

/** 64 px of hand room around a small grip. */
function Handle({ at, onPointer }: { at: number; onPointer: (event: PointerEvent<SVGGElement>) => void }) {
  return (
    <g onPointerDown={onPointer} onPointerMove={onPointer} className="cursor-ns-resize">
      <rect x={glass.left} y={at - 32} width={view.width - glass.left} height={64} fill="transparent" />
      <line x1={glass.left - 8} x2={372} y1={at} y2={at} stroke="var(--ink)" strokeWidth="2" />
      <path d={`M${glass.left - 24} ${at - 9}V${at + 9}L${glass.left - 8} ${at}Z`} fill="var(--ink)" />
      <rect
        x={345}
        y={at - 16}
        width={24}
        height={32}
        rx={4}
        fill="var(--paper)"
        stroke="var(--ink)"
        strokeWidth="2"
      />
      <path d={`M351 ${at - 5}h12M351 ${at}h12M351 ${at + 5}h12`} stroke="var(--ink)" strokeWidth="1.5" />
    </g>
  )
}
