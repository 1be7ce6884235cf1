'use client'

import { closestPacking } from '@/lib/science/phase-fraction'
import { useWidth } from './use-width'

/**
 * How much is inside, by volume, on a ruler to 100 %: now solid, before hollow, and where equal round
 * drops no longer fit.
 */
export function PhiRuler({ phi, before }: { phi: number; before?: { phi: number; text: string } | null }) {
  const [box, width] = useWidth<HTMLDivElement>(600)
  const from = Math.max(0, Math.min(60, Math.floor((Math.min(phi, before?.phi ?? 1) * 100 - 4) / 10) * 10))
  const x = (percent: number) => ((percent - from) / (100 - from)) * width
  const closest = closestPacking * 100
  const now = x(phi * 100)
  const labelX = Math.min(Math.max(now, 28), width - 28)
  const unit = width / (100 - from)
  const isNarrow = width < 480
  return (
    <div ref={box} className="min-w-0">
      <svg
        width={width}
        height={84}
        viewBox={`0 0 ${width} 84`}
        overflow="visible"
        className="block"
        role="img"
        aria-label={`${(phi * 100).toFixed(1)} % inside by volume${
          before ? `, ${before.text}` : ''
        }; equal balls packed closest: 74.0 %`}
      >
        <rect x={x(closest)} y={40} width={width - x(closest)} height={16} fill="var(--recess)" />
        <path d={`M0 56H${width}`} stroke="var(--ink)" strokeWidth={1.75} />
        {Array.from({ length: 100 - from + 1 }, (_, index) => from + index).map((percent) => {
          const isTen = percent % 10 === 0
          if (!isTen && unit < 5) return null
          return (
            <path
              key={percent}
              d={`M${x(percent)} 56v-${isTen ? 16 : percent % 5 === 0 ? 11 : 6}`}
              stroke="var(--ink)"
              strokeWidth={isTen ? 2 : 1}
            />
          )
        })}
        {Array.from({ length: (100 - from) / 10 + 1 }, (_, index) => from + index * 10).map((percent) => (
          <text
            key={percent}
            x={x(percent)}
            y={76}
            fontSize={15}
            textAnchor={percent === from ? 'start' : percent === 100 ? 'end' : 'middle'}
          >
            {percent}
          </text>
        ))}
        <path d={`M${x(closest)} 62V18`} stroke="var(--ink)" strokeWidth={2} />
        <text x={x(closest) - 8} y={31} fontSize={14} textAnchor="end">
          {isNarrow ? '74.0' : 'equal balls, packed closest: 74.0'}
        </text>
        {width - x(closest) > 150 && (now - x(closest) > 150 || phi * 100 < closest) ? (
          <text x={x(closest) + 8} y={31} fontSize={14}>
            high internal phase
          </text>
        ) : null}
        {before ? (
          <>
            <circle
              cx={x(before.phi * 100)}
              cy={56}
              r={7}
              fill="var(--paper)"
              stroke="var(--ink)"
              strokeWidth={2}
            />
            {isNarrow || labelX + 48 + before.text.length * 7.2 > width ? null : (
              <g>
                <circle
                  cx={labelX + 52}
                  cy={11}
                  r={4}
                  fill="var(--ground)"
                  stroke="var(--ink)"
                  strokeWidth={1.5}
                />
                <text x={labelX + 61} y={16} fontSize={14}>
                  {before.text}
                </text>
              </g>
            )}
          </>
        ) : null}
        <path d={`M${now} 24V56`} stroke="var(--ink)" strokeWidth={2} />
        <circle cx={now} cy={56} r={7.5} fill="var(--ink)" stroke="var(--ground)" strokeWidth={1.5} />
        <text x={labelX} y={18} fontSize={24} fontWeight={700} textAnchor="middle">
          {(phi * 100).toFixed(1)}
        </text>
      </svg>
    </div>
  )
}
