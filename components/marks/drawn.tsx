import type { ReactNode } from 'react'
import { pathData, round2 } from './shape'
import type { Role, Shape, Stroke } from './shape'

const COLOURS: Record<Role, string> = {
  ink: 'var(--ink)',
  soft: 'var(--soft)',
  rule: 'var(--rule)',
  hair: 'var(--hair)',
  alarm: 'var(--alarm)',
  wash: 'var(--wash)',
  ground: 'var(--ground)',
  recess: 'var(--recess)',
  paper: 'var(--paper)',
  cream: 'var(--cream)',
  water: 'var(--water)',
  oil: 'var(--oil)',
  oilLine: 'var(--oilline)',
  dot: 'var(--dot)',
  onInk: 'var(--onink)',
}

export function colourOf(role: Role): string {
  return COLOURS[role]
}

/** Shapes as SVG elements, to stand inside an <svg>. */
export function Drawn({ shapes }: { shapes: Shape[] }): ReactNode {
  return shapes.map((shape, index) => <One key={index} shape={shape} />)
}

function One({ shape }: { shape: Shape }) {
  switch (shape.kind) {
    case 'line':
      return (
        <line
          x1={round2(shape.x1)}
          y1={round2(shape.y1)}
          x2={round2(shape.x2)}
          y2={round2(shape.y2)}
          {...pen(shape)}
        />
      )
    case 'circle':
      return (
        <circle
          cx={round2(shape.cx)}
          cy={round2(shape.cy)}
          r={round2(shape.r)}
          fill={shape.fill ? COLOURS[shape.fill] : 'none'}
          {...pen(shape)}
        />
      )
    case 'path':
      return (
        <path
          d={pathData(shape.steps)}
          fill={shape.fill ? COLOURS[shape.fill] : 'none'}
          fillOpacity={shape.opacity}
          {...pen(shape)}
        />
      )
    case 'rect':
      return (
        <rect
          x={round2(shape.x)}
          y={round2(shape.y)}
          width={round2(shape.w)}
          height={round2(shape.h)}
          rx={shape.rx === undefined ? undefined : round2(shape.rx)}
          fill={shape.fill ? COLOURS[shape.fill] : 'none'}
          {...pen(shape)}
        />
      )
    case 'text':
      return (
        <text
          x={round2(shape.x)}
          y={round2(shape.y)}
          fontSize={shape.size}
          fontWeight={shape.weight}
          textAnchor={shape.anchor}
          // A style, because the page's own rule for words in drawings is stronger than an attribute.
          style={{ fill: COLOURS[shape.fill] }}
          className={shape.mono ? 'font-mono' : undefined}
        >
          {shape.text}
        </text>
      )
  }
}

function pen({ stroke, width, dash, cap, join }: Stroke) {
  if (!stroke) return {}
  return {
    stroke: COLOURS[stroke],
    strokeWidth: width === undefined ? undefined : round2(width),
    strokeDasharray: dash ? dash.map(round2).join(' ') : undefined,
    strokeLinecap: cap,
    strokeLinejoin: join,
  }
}
