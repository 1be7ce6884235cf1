import { heatWeight } from '@/components/marks/heat'

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
  return (
    <span
      className="inline-flex items-start whitespace-nowrap leading-none"
      style={{ fontSize: size, fontWeight: heatWeight(celsius) }}
    >
      {celsius < 0 ? '\u2212' : ''}
      {Math.abs(celsius)}
      <span style={{ fontSize: size * 0.46, marginLeft: size * 0.08, marginTop: size * 0.02 }}>°C</span>
    </span>
  )
}
