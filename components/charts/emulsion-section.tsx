'use client'

import { useMemo, type ReactNode } from 'react'
import { Drawn } from '../marks/drawn'
import { round2 } from '../marks/shape'
import { emulsionShapes, spotFor } from './emulsion-shapes'
import type { EmulsionInput } from './emulsion-shapes'
import { useWidth } from './use-width'

export type EmulsionQuestion = {
  id: string
  title: ReactNode
  answer: string
  reason: string
  isOpen: boolean
  /** What of the drawing it is about. */
  at: 'film' | 'drop'
}

export type EmulsionSectionProps = EmulsionInput & {
  /** What is said under the drawing after its share: where the drops were measured. */
  note?: string
  questions?: EmulsionQuestion[]
  height?: number
}

const SECTION = 364
const GAP = 42

/**
 * A cut through the emulsion, to scale: what is inside takes the share of the area that it takes of the
 * volume. Questions about the formula point at the place they are about.
 */
export function EmulsionSection({
  phi,
  inside,
  dropMicrometres,
  note,
  questions = [],
  height = 494,
}: EmulsionSectionProps) {
  const [box, available] = useWidth<HTMLDivElement>(600)
  const isBeside = questions.length > 0 && available >= 560
  const width = Math.min(SECTION, available)
  const { shapes, drops } = useMemo(
    () => emulsionShapes({ phi, inside, dropMicrometres }, { width, height }),
    [phi, inside, dropMicrometres, width, height],
  )
  const outside = inside === 'water' ? 'oil' : 'water'
  const percent = (phi * 100).toFixed(1)
  const pitch = questions.length > 0 ? height / questions.length : height
  const caption = (
    <p className="max-w-[400px] pt-2 text-13 text-soft">
      A cut through it, to scale: the {inside} takes {percent} % of the area as of the volume, in drops of
      mixed sizes as they pack.
      {dropMicrometres === null ? ' The size of the drops has not been measured.' : note ? ` ${note}` : ''}
    </p>
  )
  return (
    <div ref={box} className="min-w-0">
      <div className={isBeside ? 'relative' : ''} style={isBeside ? { minHeight: height } : undefined}>
        <svg
          width={width}
          height={height}
          viewBox={`0 0 ${width} ${height}`}
          overflow="visible"
          className={isBeside ? 'absolute top-0 left-0' : 'block'}
          role="img"
          aria-label={`A cut through the emulsion: drops of ${inside} take ${percent} % of the area, ${outside} the rest.`}
        >
          <Drawn shapes={shapes} />
          {isBeside
            ? questions.map((question, index) => {
                // The browser's cosine may differ from the server's in its last digit; rounded, both draw the same.
                const y = round2(index * pitch + 14)
                const [x, spotY] = spotFor(question.at, y + 12, drops, { width, height }).map(round2) as [
                  number,
                  number,
                ]
                const colour = question.isOpen ? 'var(--alarm)' : 'var(--ink)'
                return (
                  <g key={question.id}>
                    <path
                      d={`M${x} ${spotY}L${width + 16} ${y}H${width + 32}`}
                      fill="none"
                      stroke={colour}
                      strokeWidth={1.75}
                    />
                    <circle cx={x} cy={spotY} r={5} fill={colour} stroke="var(--ground)" strokeWidth={2} />
                  </g>
                )
              })
            : null}
        </svg>
        {isBeside ? null : caption}
        {questions.length > 0 ? (
          <ul
            className={isBeside ? '' : 'mt-4 grid gap-4'}
            style={isBeside ? { paddingLeft: width + GAP } : undefined}
          >
            {questions.map((question) => (
              <li key={question.id} style={isBeside ? { minHeight: pitch } : undefined}>
                <p className="text-16 font-700">{question.title}</p>
                <p className={`text-15 ${question.isOpen ? 'font-700 text-alarm' : ''}`}>{question.answer}</p>
                <p className="text-14 leading-[1.3] text-soft">{question.reason}</p>
              </li>
            ))}
          </ul>
        ) : null}
      </div>
      {isBeside ? caption : null}
    </div>
  )
}
