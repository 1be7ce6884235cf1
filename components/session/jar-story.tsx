import { Drawn } from '@/components/marks/drawn'
import { jarShapes, type Posture } from '@/components/marks/jar-shapes'
import { moveShapes } from '@/components/marks/place'

type Pull = { week: number; waterPercent: number; oilPercent: number; posture: Posture }

const pulls: Pull[] = [
  { week: 0, waterPercent: 0, oilPercent: 0, posture: 'upright' },
  { week: 1, waterPercent: 0, oilPercent: 0, posture: 'upright' },
  { week: 2, waterPercent: 0, oilPercent: 0, posture: 'upright' },
  { week: 3, waterPercent: 0.2, oilPercent: 0, posture: 'upright' },
  { week: 4, waterPercent: 0.3, oilPercent: 0, posture: 'leaning' },
  { week: 5, waterPercent: 1.3, oilPercent: 0.3, posture: 'leaning' },
  { week: 6, waterPercent: 5.5, oilPercent: 1.9, posture: 'lying' },
  { week: 8, waterPercent: 12.4, oilPercent: 4.4, posture: 'lying' },
  { week: 10, waterPercent: 17.7, oilPercent: 6.3, posture: 'lying' },
]
const frontWeek = 5.07
const limitPercent = 2

type Size = {
  width: number
  height: number
  shelf: number
  zero: number
  pitch: number
  jar: number
  figure: { x: number; y: number; size: number }
  words: { x: number; y: number; size: number; lines: string[] }
  numbers: number
  front: { y: number; size: number }
}

const wide: Size = {
  width: 1440,
  height: 340,
  shelf: 252,
  zero: 326,
  pitch: 102.5,
  jar: 126,
  figure: { x: 34, y: 230, size: 120 },
  words: {
    x: 40,
    y: 46,
    size: 17,
    lines: ['One cream in one oven, jar by jar,', 'drawn to the layers that were measured'],
  },
  numbers: 15,
  front: { y: 30, size: 15 },
}

const tablet: Size = {
  width: 820,
  height: 250,
  shelf: 186,
  zero: 188,
  pitch: 57,
  jar: 76,
  figure: { x: 38, y: 168, size: 62 },
  words: {
    x: 40,
    y: 40,
    size: 17,
    lines: ['One cream in one oven, jar by jar,', 'drawn to the layers that were measured'],
  },
  numbers: 14,
  front: { y: 40, size: 15 },
}

const phone: Size = {
  width: 390,
  height: 250,
  shelf: 192,
  zero: 32,
  pitch: 31.5,
  jar: 42,
  figure: { x: 16, y: 124, size: 50 },
  words: { x: 16, y: 34, size: 16, lines: ['One cream in one', 'oven, jar by jar'] },
  numbers: 13,
  front: { y: 34, size: 15 },
}

/** What the product is about, in one drawing: a cream in one oven, jar by jar, until it comes apart. */
export function JarStory() {
  return (
    <div
      role="img"
      aria-label="Example: one cream at 45 °C. Whole until week 2, leaning in weeks 4 and 5, out of its band from week 6, 24.0 % come apart in week 10."
      className="bg-recess"
    >
      <Drawing size={phone} className="sm:hidden" />
      <Drawing size={tablet} className="hidden sm:block lg:hidden" />
      <Drawing size={wide} className="hidden lg:block" />
    </div>
  )
}

function Drawing({ size, className }: { size: Size; className: string }) {
  const { width, height, shelf, zero, pitch, jar, figure, words, numbers, front } = size
  const at = (week: number) => zero + week * pitch
  return (
    <svg viewBox={`0 0 ${width} ${height}`} aria-hidden className={`w-full ${className}`}>
      <rect x={at(frontWeek)} y="0" width={width - at(frontWeek)} height={shelf} fill="var(--wash)" />
      <path d={`M${at(frontWeek)} 0V${shelf}`} stroke="var(--alarm)" strokeWidth="3" />
      <text x={at(frontWeek) + 12} y={front.y} fontSize={front.size} style={{ fill: 'var(--alarm)' }}>
        {size === phone ? 'It has left its band' : 'Past this line it has left its band'}
      </text>
      {words.lines.map((line, index) => (
        <text key={line} x={words.x} y={words.y + index * words.size * 1.42} fontSize={words.size}>
          {line}
        </text>
      ))}
      <text
        x={figure.x}
        y={figure.y}
        fontSize={figure.size}
        fontWeight="720"
        letterSpacing={-figure.size / 48}
      >
        45
        <tspan fontSize={figure.size * 0.42} dx="4" dy={-figure.size * 0.38} letterSpacing="0">
          °C
        </tspan>
      </text>
      <path d={`M${words.x} ${shelf + 2}H${width}`} stroke="var(--ink)" strokeWidth="4" />
      {pulls.map((pull) => (
        <g key={pull.week}>
          <path
            d={`M${at(pull.week)} ${shelf + 4}v${jar > 60 ? 11 : 6}`}
            stroke="var(--ink)"
            strokeWidth="1.75"
          />
          <Drawn
            shapes={moveShapes(
              jarShapes({
                height: jar,
                posture: pull.posture,
                bottomPercent: pull.waterPercent,
                topPercent: pull.oilPercent,
              }),
              at(pull.week) + nudge(pull.posture) * jar,
              shelf,
            )}
          />
          <text
            x={at(pull.week)}
            y={shelf + numbers * 2.4}
            fontSize={numbers * 1.33}
            fontWeight="600"
            textAnchor="middle"
          >
            {pull.week}
          </text>
          {size === phone && pull.week % 2 === 1 ? null : <Share pull={pull} x={at(pull.week)} size={size} />}
        </g>
      ))}
      {size === wide ? (
        <g fontSize={numbers} style={{ fill: 'var(--soft)' }}>
          <text x={words.x} y={shelf + numbers * 2.4} style={{ fill: 'var(--soft)' }}>
            week
          </text>
          <text x={words.x} y={shelf + numbers * 3.9} style={{ fill: 'var(--soft)' }}>
            came apart
          </text>
        </g>
      ) : null}
    </svg>
  )
}

function Share({ pull, x, size }: { pull: Pull; x: number; size: Size }) {
  const share = pull.waterPercent + pull.oilPercent
  const isOut = share > limitPercent
  return (
    <text
      x={x}
      y={size.shelf + size.numbers * 3.9}
      fontSize={size.numbers}
      fontWeight={isOut ? 700 : 430}
      textAnchor="middle"
      style={{ fill: isOut ? 'var(--alarm)' : 'var(--soft)' }}
    >
      {share.toFixed(1)}
      {size === wide ? ' %' : ''}
    </text>
  )
}

/** A leaning jar steps back onto its tick, a fallen one lies forward from it. */
function nudge(posture: Posture): number {
  if (posture === 'leaning') return -0.03
  return posture === 'lying' ? 0.11 : 0
}
