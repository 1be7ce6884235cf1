import { degrees } from '@/lib/study/rules/finding'
import { grouped } from '@/lib/number/rules'

/** What a place does to the jars that stand in it. */
export type Keeps = {
  kind: string
  temperatureC: number | null
  cycleLowC: number | null
  cycleHighC: number | null
  isLit: boolean
}

export function isLit({
  lightLux,
  lightUvWm2,
}: {
  lightLux: number | null
  lightUvWm2: number | null
}): boolean {
  return lightLux !== null || lightUvWm2 !== null
}

/** "at 40 °C instead of 45 °C"; null where the place does to the jars what the series asks for. */
export function differenceOf(asked: Keeps, there: Keeps): string | null {
  if (heatOf(asked) !== heatOf(there))
    return `${heatOf(there)} instead of ${heatOf(asked).replace(/^at /, '')}`
  if (asked.isLit === there.isLit) return null
  return asked.isLit ? 'in the dark instead of in light' : 'in light instead of in the dark'
}

function heatOf({ kind, temperatureC, cycleLowC, cycleHighC }: Keeps): string {
  if (kind === 'transport') return 'on the road'
  if (kind === 'freeze-thaw') {
    return cycleLowC === null || cycleHighC === null
      ? 'in freeze-thaw cycles'
      : `in freeze-thaw cycles from ${degrees(cycleLowC)} to ${degrees(cycleHighC)}`
  }
  return temperatureC === null ? 'at no set temperature' : `at ${degrees(temperatureC)}`
}

/** "10 000 lux, 0.4 W/m² of UV, 16 h a day". */
export function lightText(station: {
  lightLux: number | null
  lightUvWm2: number | null
  lightHours: number | null
}): string | null {
  if (!isLit(station)) return null
  return [
    station.lightLux === null ? null : `${grouped(station.lightLux, 0)} lux`,
    station.lightUvWm2 === null ? null : `${station.lightUvWm2} W/m² of UV`,
    `${station.lightHours} h a day`,
  ]
    .filter((part) => part !== null)
    .join(', ')
}
