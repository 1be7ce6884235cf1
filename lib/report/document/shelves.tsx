import { G, Line, Svg, Text, View } from '@react-pdf/renderer'
import { jarShapes } from '@/components/marks/jar-shapes'
import { moveShapes } from '@/components/marks/place'
import { PdfDrawn } from '@/components/marks/pdf-drawn'
import { heatLine, heatWeight } from '@/components/marks/heat'
import { text } from '@/lib/report/document/fonts'
import type { CaseContent, ShelfEvidence } from '@/lib/shelf-case/rules/content'

const family = text as unknown as string
const width = 511
const left = 96

/** Jar glyphs on their shelves by true time: the case's own station, then the others, worst batch each. */
export function Shelves({ content }: { content: CaseContent }) {
  const shelves = pickShelves(content)
  const last = Math.max(content.proposal.months, ...shelves.flatMap((s) => s.jars.map((j) => j.months)), 1)
  const span = Math.max(3, Math.ceil(last / 3) * 3)
  const x = (months: number) => left + (months / span) * (width - left - 26)
  // Seven shelves leave room for the curve and the signature on the same sheet.
  const rowHeight = shelves.length > 4 ? 33 : 38
  const height = 30 + shelves.length * rowHeight
  const tick = span > 24 ? 6 : span > 12 ? 3 : 1
  const marks = Array.from({ length: Math.floor(span / tick) + 1 }, (_, i) => i * tick)
  return (
    <View wrap={false} style={{ marginTop: 10 }}>
      <Svg width={width} height={height} viewBox={`0 0 ${width} ${height}`}>
        <Word x={left - 26} y={13} size={8.5} anchor="end">
          month
        </Word>
        <Line x1={x(0)} x2={x(span)} y1={20} y2={20} stroke="#000" strokeWidth={1} />
        {marks.map((m) => (
          <G key={m}>
            <Line x1={x(m)} x2={x(m)} y1={16} y2={20} stroke="#000" strokeWidth={1} />
            <Word x={x(m)} y={13} size={9} weight={m === content.proposal.months ? 800 : 500} anchor="middle">
              {String(m)}
            </Word>
          </G>
        ))}
        <Line
          x1={x(content.proposal.months)}
          x2={x(content.proposal.months)}
          y1={16}
          y2={height}
          stroke="#000"
          strokeWidth={1.25}
        />
        {shelves.map((shelf, row) => {
          const y = 30 + (row + 1) * rowHeight - 10
          const celsius = shelf.temperatureC ?? -10
          return (
            <G key={`${shelf.label}${shelf.batch}`}>
              <Word x={0} y={y - 5} size={shelf.isFreezeThaw ? 9 : 15} weight={paperWeight(celsius)}>
                {shelf.isFreezeThaw ? 'freeze-thaw' : `${shelf.label} °C`}
              </Word>
              <Word x={54} y={y - 5} size={7.5}>
                {shelf.batch}
              </Word>
              <Line x1={0} x2={width} y1={y} y2={y} stroke="#000" strokeWidth={heatLine(celsius) * 0.75} />
              {shelf.jars.map((jar, i) => {
                const next = shelf.jars[i + 1]
                const isRoomy = next === undefined || x(next.months) - x(jar.months) > 34
                const posture =
                  jar.standing === 'out' ? 'lying' : jar.standing === 'leaning' ? 'leaning' : 'upright'
                return (
                  <G key={i}>
                    <PdfDrawn
                      shapes={moveShapes(
                        jarShapes({
                          height: 26,
                          topPercent: jar.topPercent,
                          bottomPercent: jar.bottomPercent,
                          posture,
                        }),
                        x(jar.months),
                        y - 0.5,
                      )}
                    />
                    {isRoomy ? (
                      <Word x={x(jar.months) + (posture === 'lying' ? 15 : 10)} y={y - 3} size={7}>
                        {jar.percent.toFixed(1)}
                      </Word>
                    ) : null}
                  </G>
                )
              })}
            </G>
          )
        })}
      </Svg>
      <Text style={{ fontSize: 7.5, color: '#333', marginTop: 2 }}>
        Jars drawn to their measured layers, separation in % of fill height. A jar that lies had left its
        band, one that leans was leaving it. The line marks the months proposed.
      </Text>
    </View>
  )
}

function pickShelves(content: CaseContent): ShelfEvidence[] {
  const own = content.shelves.filter(
    (s) => !s.isFreezeThaw && s.temperatureC === content.station.temperatureC,
  )
  const rest = content.shelves.filter((s) => !own.includes(s))
  const worst = new Map<string, ShelfEvidence>()
  for (const shelf of rest) {
    const kept = worst.get(shelf.label)
    if (!kept || peak(shelf) > peak(kept)) worst.set(shelf.label, shelf)
  }
  return [...own, ...worst.values()].slice(0, 7)
}

const peak = (shelf: ShelfEvidence) => Math.max(0, ...shelf.jars.map((j) => j.percent))

/** The static font comes in hundreds; heat keeps its order. */
function paperWeight(celsius: number): number {
  return Math.min(800, Math.max(300, Math.round(heatWeight(celsius) / 100) * 100))
}

type Words = {
  x: number
  y: number
  size: number
  weight?: number
  anchor?: 'start' | 'middle' | 'end'
  children: string
}

export function Word({ x, y, size, weight = 400, anchor = 'start', children }: Words) {
  return (
    <Text x={x} y={y} textAnchor={anchor} style={{ fontSize: size, fontWeight: weight, fontFamily: family }}>
      {children}
    </Text>
  )
}
