import { assertComputable, assertFinite, assertNotNegative, assertPositive, ScienceError } from './guard'
import { gramsOfJars } from './jar-grams'

export type JarPlanStation = {
  name: string
  timePoints: number[]
  watchJars: number
  measuringJarsPerPull: number
  spares: number
}

export type JarPlanInput = {
  stations: JarPlanStation[]
  initialJars: number
  retains: number
  fillG: number
  batchG: number
  lossPercent: number
}

export type JarPlan = {
  jars: number
  watchJars: number
  measuringJars: number
  spares: number
  grams: number
  fits: boolean
  shortG: number
}

/**
 * Jars and grams that a study takes of one batch: every station's watch jars and spares, a measuring jar for every
 * pull, the jars of the initial, the retains; grams = jars × fill ÷ (1 − loss).
 */
export function jarPlan(input: JarPlanInput): JarPlan {
  assertCount('initialJars', input.initialJars)
  assertCount('retains', input.retains)
  assertPositive('fillG', input.fillG)
  assertPositive('batchG', input.batchG)
  assertFinite('lossPercent', input.lossPercent)
  if (input.lossPercent < 0 || input.lossPercent >= 100) {
    throw new ScienceError('lossPercent', `must be from 0 to under 100, not ${input.lossPercent}`)
  }
  let watchJars = 0
  let measuringJars = 0
  let spares = 0
  input.stations.forEach((station, i) => {
    const at = `stations[${i}]`
    assertCount(`${at}.watchJars`, station.watchJars)
    assertCount(`${at}.measuringJarsPerPull`, station.measuringJarsPerPull)
    assertCount(`${at}.spares`, station.spares)
    station.timePoints.forEach((time, j) => assertNotNegative(`${at}.timePoints[${j}]`, time))
    watchJars += station.watchJars
    measuringJars += station.measuringJarsPerPull * station.timePoints.length
    spares += station.spares
  })
  const jars = watchJars + measuringJars + spares + input.initialJars + input.retains
  const grams = gramsOfJars(jars, input.fillG, input.lossPercent)
  const shortG = Math.max(0, grams - input.batchG)
  return assertComputable('stations', {
    jars,
    watchJars,
    measuringJars,
    spares,
    grams,
    fits: shortG === 0,
    shortG,
  })
}

function assertCount(field: string, value: number): void {
  assertFinite(field, value)
  if (!Number.isSafeInteger(value) || value < 0)
    throw new ScienceError(field, `must be a whole number, not ${value}`)
}
