import { Circle, G, Line, Path, Rect, Svg, Text } from '@react-pdf/renderer'
import type { ReactNode } from 'react'
import { pathData, round2 } from './shape'
import type { Role, Shape, Stroke } from './shape'

/** On paper everything is black on white; only what is in a jar keeps its colour, beside its texture. */
const COLOURS: Record<Role, string> = {
  ink: '#000000',
  soft: '#444444',
  rule: '#777777',
  hair: '#bbbbbb',
  alarm: '#000000',
  wash: '#e4e4e4',
  ground: '#ffffff',
  recess: '#eeeeee',
  paper: '#ffffff',
  cream: '#ffffff',
  water: '#1f5da8',
  oil: '#e2a31a',
  oilLine: '#8a5b00',
  dot: '#000000',
  onInk: '#ffffff',
}

export function pdfColourOf(role: Role): string {
  return COLOURS[role]
}

/** The same shapes as elements of a @react-pdf Svg. The family must have been registered by the document. */
export function PdfDrawn({
  shapes,
  fontFamily,
  monoFamily,
}: {
  shapes: Shape[]
  fontFamily?: string
  monoFamily?: string
}): ReactNode {
  return shapes.map((shape, index) => (
    <One key={index} shape={shape} family={shape.kind === 'text' && shape.mono ? monoFamily : fontFamily} />
  ))
}

/** Shapes as a drawing of their own, `scale` points to the pixel. */
export function PdfFigure({
  shapes,
  view,
  scale = 1,
  fontFamily,
  monoFamily,
}: {
  shapes: Shape[]
  view: { x: number; y: number; width: number; height: number }
  scale?: number
  fontFamily?: string
  monoFamily?: string
}) {
  return (
    <Svg
      width={view.width * scale}
      height={view.height * scale}
      viewBox={`${view.x} ${view.y} ${view.width} ${view.height}`}
    >
      <G>
        <PdfDrawn shapes={shapes} fontFamily={fontFamily} monoFamily={monoFamily} />
      </G>
    </Svg>
  )
}

function One({ shape, family }: { shape: Shape; family?: string }) {
  switch (shape.kind) {
    case 'line':
      return <Line x1={shape.x1} y1={shape.y1} x2={shape.x2} y2={shape.y2} {...pen(shape)} />
    case 'circle':
      return <Circle cx={shape.cx} cy={shape.cy} r={shape.r} fill={fillOf(shape.fill)} {...pen(shape)} />
    case 'path':
      return (
        <Path
          d={pathData(shape.steps)}
          fill={fillOf(shape.fill)}
          fillOpacity={shape.opacity}
          {...pen(shape)}
        />
      )
    case 'rect':
      return (
        <Rect
          x={shape.x}
          y={shape.y}
          width={shape.w}
          height={shape.h}
          rx={shape.rx}
          ry={shape.rx}
          fill={fillOf(shape.fill)}
          {...pen(shape)}
        />
      )
    case 'text':
      return (
        <Text
          x={shape.x}
          y={shape.y}
          fill={COLOURS[shape.fill]}
          textAnchor={shape.anchor}
          style={{ fontSize: shape.size, fontWeight: shape.weight >= 600 ? 700 : 400, fontFamily: family }}
        >
          {shape.text}
        </Text>
      )
  }
}

function fillOf(role: Role | undefined): string {
  return role ? COLOURS[role] : 'none'
}

function pen({ stroke, width, dash, cap, join }: Stroke) {
  if (!stroke) return {}
  return {
    stroke: COLOURS[stroke],
    strokeWidth: width ?? 1,
    strokeDasharray: dash ? dash.map(round2).join(' ') : undefined,
    strokeLineCap: cap,
    strokeLineJoin: join,
  }
}
