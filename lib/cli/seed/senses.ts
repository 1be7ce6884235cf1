import type { PlannedAttribute } from '@/lib/protocol/schema'

/** How the lotion of the demo is to the senses, invented: it yellows, its drops grow and it foams less with heat. */
type Sensed = { typed: string; detail?: Record<string, unknown> }

export function sensed(
  { attribute }: PlannedAttribute,
  place: { temperatureC: number | null },
  weeks: number,
  normal: () => number,
): Sensed | null {
  // Twice as fast for each ten degrees, of the time that a drift at 45 °C takes.
  const heat = 2 ** (((place.temperatureC ?? 25) - 45) / 10) * (weeks / 6)
  switch (attribute) {
    case 'type':
      return { typed: 'water outside', detail: { typeMethod: 'dilution' } }
    case 'colour': {
      const [L, a, b] = [88.4 - heat * 0.9, 0.9 + heat * 0.3, 8.6 + heat * 2.1]
      return { typed: [L, a, b].map((one) => (one + normal() * 0.05).toFixed(2)).join(' ') }
    }
    case 'droplets':
      return { typed: dropsTyped(3.2 * (1 + heat * 0.18), normal) }
    case 'density':
      return {
        typed: (0.978 + heat * 0.002 + normal() * 0.001).toFixed(3),
        detail: { sampleTemperatureC: 25 },
      }
    case 'own.Foam-height':
      return { typed: Math.round(142 - heat * 14 + normal() * 3).toFixed(0) }
    default:
      return null
  }
}

/** Drops as one counts them under a microscope: classes of half a micrometre and how many lie in each. */
export function dropsTyped(medianUm: number, normal: () => number): string {
  const classes = new Map<string, number>()
  for (let i = 0; i < 120; i += 1) {
    const size = Math.max(0.5, Math.round(2 * medianUm * 0.85 * Math.exp(0.3 * normal())) / 2).toFixed(1)
    classes.set(size, (classes.get(size) ?? 0) + 1)
  }
  return [...classes]
    .toSorted((a, b) => Number(a[0]) - Number(b[0]))
    .map(([size, count]) => `${size} × ${count}`)
    .join('; ')
}
