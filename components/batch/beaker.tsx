import { colourOf, Drawn } from '@/components/marks/drawn'
import type { Point } from '@/components/marks/shape'
import { dots, stripes } from '@/components/marks/texture'
import { gramsText, toleranceGrams } from '@/lib/batch/rules/weighing'

type Props = { targetG: number; actualG: number | null; tolerancePercent: number; isWater: boolean }

const top = 12
const depth = 290
const left = 84
const wide = 220

/** The vessel's last grams drawn large: what is poured, the level that is allowed, and what is too much. */
export function Beaker({ targetG, actualG, tolerancePercent, isWater }: Props) {
  const tolerance = toleranceGrams(targetG, tolerancePercent)
  const low = Math.max(0, targetG - 6 * tolerance)
  const high = targetG + 3.2 * tolerance
  const y = (grams: number) => top + ((high - Math.min(high, Math.max(low, grams))) / (high - low)) * depth
  const level = actualG === null || actualG <= low ? top + depth : y(actualG)
  const floor = top + depth + 40
  return (
    <svg
      viewBox={`0 0 ${left + wide + 24} ${floor + 8}`}
      className="h-auto w-full max-w-[330px]"
      role="img"
      aria-label={
        actualG === null
          ? `Nothing poured yet; ${gramsText(targetG)} g are wanted`
          : `${gramsText(actualG)} g poured of ${gramsText(targetG)} g`
      }
    >
      {actualG ? <Poured level={level} floor={floor} isWater={isWater} /> : null}
      <rect
        x={left}
        y={y(targetG + tolerance)}
        width={wide}
        height={y(targetG - tolerance) - y(targetG + tolerance)}
        fill={colourOf('paper')}
        stroke="var(--ink)"
        strokeWidth="2.5"
      />
      <Drawn
        shapes={[
          {
            kind: 'path',
            steps: stripes(box(top, y(targetG + tolerance)), 5, 1, 'falling'),
            fill: 'soft',
          },
        ]}
      />
      <path d={`M${left - 14} ${y(targetG)}H${left + wide + 14}`} stroke="var(--ink)" strokeWidth="2" />
      <text x={left + wide / 2} y={y(targetG) + 17} fontSize="15" textAnchor="middle">
        allowed within {gramsText(tolerance)} g
      </text>
      <path
        d={`M${left - 8} ${top}H${left}V${floor - 12}Q${left} ${floor} ${left + 12} ${floor}H${left + wide - 12}Q${left + wide} ${floor} ${left + wide} ${floor - 12}V${top}H${left + wide + 8}`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="5"
        strokeLinecap="round"
        strokeLinejoin="round"
      />
      {[targetG - 4 * tolerance, targetG - 2 * tolerance, targetG, targetG + 2 * tolerance]
        .filter((grams) => grams > 0)
        .map((grams) => (
          <text
            key={grams}
            x={left - 20}
            y={y(grams) + 5}
            fontSize="15"
            textAnchor="end"
            fontWeight={grams === targetG ? 700 : 430}
          >
            {gramsText(grams)}
          </text>
        ))}
      {actualG === null ? null : (
        <path
          d={`M${left - 16} ${level - 8}L${left - 2} ${level}L${left - 16} ${level + 8}Z`}
          fill="var(--ink)"
        />
      )}
    </svg>
  )
}

function Poured({ level, floor, isWater }: { level: number; floor: number; isWater: boolean }) {
  const cut = top + depth + 14
  const parts = [
    [level, Math.max(level, cut - 4)],
    [cut + 4, floor - 2],
  ] as const
  return (
    <Drawn
      shapes={parts.flatMap(([from, to]) =>
        to - from < 3
          ? []
          : [
              {
                kind: 'rect',
                x: left,
                y: from,
                w: wide,
                h: to - from,
                fill: isWater ? 'water' : 'oil',
              } as const,
              isWater
                ? ({ kind: 'path', steps: stripes(box(from, to), 8, 5.2, 'rising'), fill: 'cream' } as const)
                : ({
                    kind: 'path',
                    steps: dots({ left: left + 3, right: left + wide - 3, top: from, bottom: to }, 9, 1.35),
                    fill: 'dot',
                  } as const),
              {
                kind: 'line',
                x1: left,
                x2: left + wide,
                y1: from,
                y2: from,
                stroke: 'ink',
                width: 2.5,
              } as const,
            ],
      )}
    />
  )
}

function box(from: number, to: number): Point[] {
  return [
    [left, from],
    [left + wide, from],
    [left + wide, to],
    [left, to],
  ]
}
