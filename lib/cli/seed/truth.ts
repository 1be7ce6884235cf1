/**
 * How the demo's emulsions behave, invented: figures of a jar without noise, by station and week. Rates are
 * given at 45 °C and fall with the temperature; a lag shifts the onset of separation.
 */
export type Behaviour = {
  ph: number
  phSd: number
  /** Shift of pH a week at 45 °C. */
  phRate: number
  viscosity: number
  /** Scatter from jar to jar, a share. */
  viscositySd: number
  /** Building up over the first two weeks, a share. */
  build: number
  /** Share lost in twelve weeks at 45 °C. */
  thinning: number
  /** Week in which separation begins at 45 °C, and what it has reached at week 12 in %. */
  onset45: number
  reached45: number
  /** Share of the separated layer that is free oil. */
  oilShare: number
  /** Percent of mass lost in twelve weeks at 45 °C. */
  massLoss: number
  /** From this cycle on freeze-thaw leaves water, in %, and thins it. */
  thaw: { fromCycle: number; percent: number; thinning: number } | null
}

export const behaviours: Record<string, Behaviour> = {
  SI82: {
    ph: 5.6,
    phSd: 0.06,
    phRate: -0.006,
    viscosity: 62_000,
    viscositySd: 0.03,
    build: 0.07,
    thinning: 0.12,
    onset45: 9,
    reached45: 1,
    oilShare: 1,
    massLoss: 0.4,
    thaw: null,
  },
  N86: {
    ph: 5.3,
    phSd: 0.07,
    phRate: -0.008,
    viscosity: 180_000,
    viscositySd: 0.05,
    build: 0.08,
    thinning: 0.38,
    onset45: 4.4,
    reached45: 7,
    oilShare: 0.25,
    massLoss: 0.6,
    thaw: { fromCycle: 4, percent: 4, thinning: 0.35 },
  },
  L1: {
    ph: 5.5,
    phSd: 0.025,
    phRate: -0.026,
    viscosity: 6500,
    viscositySd: 0.025,
    build: 0.05,
    thinning: 0.15,
    onset45: 9,
    reached45: 2,
    oilShare: 0,
    massLoss: 0.8,
    thaw: null,
  },
  L2: {
    ph: 5.45,
    phSd: 0.015,
    phRate: -0.009,
    viscosity: 6200,
    viscositySd: 0.012,
    build: 0.02,
    thinning: 0.05,
    onset45: 60,
    reached45: 0,
    oilShare: 0,
    massLoss: 0.25,
    thaw: null,
  },
  SI80: {
    ph: 5.7,
    phSd: 0.03,
    phRate: -0.004,
    viscosity: 58_000,
    viscositySd: 0.02,
    build: 0.03,
    thinning: 0.06,
    onset45: 60,
    reached45: 0,
    oilShare: 1,
    massLoss: 0.3,
    thaw: null,
  },
}

export type Place = { temperatureC: number | null; isFreezeThaw: boolean }

/** How fast everything goes against 45 °C. */
export function pace({ temperatureC, isFreezeThaw }: Place): number {
  if (isFreezeThaw) return 0.05
  const t = temperatureC ?? 25
  if (t >= 45) return 1
  if (t >= 40) return 0.5
  if (t >= 30) return 0.16
  if (t >= 20) return 0.09
  return 0.01
}

export function truePh(b: Behaviour, place: Place, weeks: number): number {
  return b.ph + b.phRate * pace(place) * weeks
}

export function trueViscosity(b: Behaviour, place: Place, weeks: number): number {
  const build = 1 + b.build * Math.min(1, weeks / 2)
  const thaw = b.thaw && place.isFreezeThaw && weeks >= b.thaw.fromCycle - 0.3 ? 1 - b.thaw.thinning : 1
  return b.viscosity * build * Math.exp((Math.log(1 - b.thinning) * pace(place) * weeks) / 12) * thaw
}

/** Percent of the fill that came apart: nothing, then a rise that slows. */
export function trueSeparation(b: Behaviour, place: Place, weeks: number): number {
  if (place.isFreezeThaw) return b.thaw && weeks >= b.thaw.fromCycle - 0.3 ? b.thaw.percent : 0
  const speed = pace(place)
  if (speed < 0.3) return 0
  const onset = b.onset45 / Math.sqrt(speed)
  if (weeks <= onset || b.reached45 === 0) return 0
  const plateau = b.reached45 * 1.5
  const rate = -Math.log(1 - b.reached45 / plateau) / (12 - b.onset45)
  return plateau * (1 - Math.exp(-rate * speed * (weeks - onset)))
}

export function trueMassChange(b: Behaviour, place: Place, weeks: number): number {
  const speed = place.isFreezeThaw ? 0.1 : Math.max(0.06, pace(place))
  return (-b.massLoss * speed * weeks) / 12
}
