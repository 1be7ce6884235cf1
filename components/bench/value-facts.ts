import type { BenchField } from '@/lib/bench/rules'
import { nearerEdge } from '@/lib/science/band'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import { separationMethod, viscosityMethod } from '@/lib/science/methods/measures'
import { percentOf } from '@/lib/science/percent'
import { separationDetectionLimit } from '@/lib/science/separation'
import { viscosity, viscosityFactor } from '@/lib/science/viscosity'

/** What a torque comes to, with its error and the distance to the nearer edge that the error is held against. */
export function torqueFacts(
  { viscosity: planned, band, initial }: BenchField,
  torquePercent: number,
): FigureFacts | null {
  if (!planned) return null
  const { spindleConstant, rpm } = planned
  const edge = band && initial ? nearerEdge(band, initial) : Infinity
  const input = {
    torquePercent,
    spindleConstant,
    rpm,
    ...(initial && Number.isFinite(edge) ? { bandPercent: percentOf(edge, initial) } : {}),
  }
  const { mPas, fullScalemPas, errorPercent, doubt } = viscosity(input)
  return factsOf(viscosityMethod, {
    result: exactly(mPas, 'mPa·s'),
    values: { ...input, factor: viscosityFactor(spindleConstant, rpm), fullScalemPas, errorPercent },
    more: [{ says: 'spindle', value: planned.spindle }, ...(doubt ? [{ says: 'doubt', value: doubt }] : [])],
    input,
  })
}

export function layersFacts(percent: number, totalMm: number, topMm: number, bottomMm: number): FigureFacts {
  return factsOf(separationMethod, {
    result: exactly(percent, '%'),
    values: { topMm, bottomMm, totalMm, detectPercent: separationDetectionLimit(totalMm) },
    input: { totalMm, topMm, bottomMm },
  })
}
