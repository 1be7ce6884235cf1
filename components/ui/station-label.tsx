type Heat = { weight: number; line: number }

const steps: [number, Heat][] = [
  [-10, { weight: 220, line: 0.75 }],
  [5, { weight: 300, line: 1 }],
  [25, { weight: 430, line: 1.75 }],
  [40, { weight: 640, line: 3 }],
  [45, { weight: 720, line: 4 }],
  [50, { weight: 800, line: 5 }],
]

/** Heat is weight: type and line of a station by its temperature, between the steps in proportion. */
export function heatOf(celsius: number): Heat {
  const first = steps[0]?.[1] ?? { weight: 430, line: 1.75 }
  let before: [number, Heat] = [Number.NEGATIVE_INFINITY, first]
  for (const step of steps) {
    if (celsius <= step[0]) {
      if (!Number.isFinite(before[0])) return step[1]
      const share = (celsius - before[0]) / (step[0] - before[0])
      return {
        weight: Math.round(before[1].weight + share * (step[1].weight - before[1].weight)),
        line: before[1].line + share * (step[1].line - before[1].line),
      }
    }
    before = step
  }
  return before[1]
}

type Props = {
  /** null for freeze-thaw, which has two temperatures and its own name. */
  celsius: number | null
  name?: string
  /** Height of the figures in px: 50 at the sheet, 36 in a walk, 17 in a line of text. */
  size?: number
}

/** 45 with a small raised °C, as heavy as it is hot. Freeze-thaw: one word light, one heavy. */
export function StationLabel({ celsius, name, size = 36 }: Props) {
  if (celsius === null) {
    const [cold = 'freeze', warm = 'thaw'] = (name ?? 'freeze thaw').split(/[\s-]+/)
    return (
      <span className="inline-block leading-[0.95]" style={{ fontSize: size * 0.46 }}>
        <span className="block" style={{ fontWeight: 260 }}>
          {cold}
        </span>
        <span className="block" style={{ fontWeight: 560 }}>
          {warm}
        </span>
      </span>
    )
  }
  const { weight } = heatOf(celsius)
  return (
    <span
      className="inline-flex items-start whitespace-nowrap leading-none"
      style={{ fontSize: size, fontWeight: weight }}
    >
      {celsius < 0 ? '\u2212' : ''}
      {Math.abs(celsius)}
      <span style={{ fontSize: size * 0.46, marginLeft: size * 0.08, marginTop: size * 0.02 }}>°C</span>
    </span>
  )
}
