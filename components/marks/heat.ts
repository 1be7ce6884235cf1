/** Heat is weight: letters and lines grow heavier with a station's temperature, hue never says it. */

export type StationMarker = 'diamond' | 'circle' | 'square' | 'triangle-up' | 'triangle-down' | 'cross'

type Heat = { temperatureC: number; weight: number; line: number; marker: StationMarker }

const COLDEST: Heat = { temperatureC: -10, weight: 220, line: 0.75, marker: 'diamond' }

const HEATS: Heat[] = [
  COLDEST,
  { temperatureC: 5, weight: 300, line: 1, marker: 'circle' },
  { temperatureC: 25, weight: 430, line: 1.75, marker: 'square' },
  { temperatureC: 40, weight: 640, line: 3, marker: 'triangle-up' },
  { temperatureC: 45, weight: 720, line: 4, marker: 'triangle-down' },
  { temperatureC: 50, weight: 800, line: 5, marker: 'cross' },
]

export function heatWeight(temperatureC: number): number {
  return Math.round(between(temperatureC, (heat) => heat.weight))
}

export function heatLine(temperatureC: number): number {
  return between(temperatureC, (heat) => heat.line)
}

export function heatMarker(temperatureC: number): StationMarker {
  return HEATS.reduce((best, heat) =>
    Math.abs(heat.temperatureC - temperatureC) < Math.abs(best.temperatureC - temperatureC) ? heat : best,
  ).marker
}

/** Straight between the stations of the table, level beyond its ends. */
function between(temperatureC: number, of: (heat: Heat) => number): number {
  let below = COLDEST
  for (const heat of HEATS) {
    if (heat.temperatureC > temperatureC) {
      if (below === heat || temperatureC <= below.temperatureC) return of(below)
      const share = (temperatureC - below.temperatureC) / (heat.temperatureC - below.temperatureC)
      return of(below) + (of(heat) - of(below)) * share
    }
    below = heat
  }
  return of(below)
}
