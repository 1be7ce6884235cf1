import type { InstrumentPage } from '@/lib/instrument/queries/list'
import { checkFluidMethod } from '@/lib/science/methods/making'
import { phSlopeMethod, viscosityMethod } from '@/lib/science/methods/measures'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'

type Detail = InstrumentPage['calibrations'][number]['detail']

/** What a calibration's finding is computed from; null where nothing is computed, or it was kept without its numbers. */
export function calibrationFacts(detail: Detail, when: string): FigureFacts | null {
  const kept = detail as Record<string, unknown>
  const number = (key: string) => (typeof kept[key] === 'number' ? kept[key] : null)
  const efficiency = number('efficiencyPercent')
  const difference = number('differencePercent')
  if (efficiency !== null && isPoints(kept['points'])) {
    const { points } = kept
    return factsOf(phSlopeMethod, {
      name: 'Efficiency of the electrode',
      result: exactly(efficiency, '%'),
      when,
      values: {
        points: points.map(({ bufferPh, mV }) => `${exactly(bufferPh)}: ${exactly(mV)} mV`).join('; '),
        temperatureC: number('temperatureC'),
        slopeMvPerPh: number('slopeMvPerPh'),
        offsetMv: number('offsetMv'),
      },
      input: { points, temperatureC: kept['temperatureC'] },
    })
  }
  if (difference !== null) {
    return factsOf(checkFluidMethod, {
      result: exactly(difference, '%'),
      when,
      values: {
        fluidMPas: number('fluidMPas'),
        readMPas: number('readMPas'),
        allowedPercent: number('allowedPercent'),
      },
      more: [{ says: 'read with', value: `${String(kept['spindle'])}, ${String(kept['rpm'])} rpm` }],
    })
  }
  return null
}

export function factorFacts(constant: number, rpm: number, factor: number): FigureFacts {
  return factsOf(viscosityMethod, {
    name: 'Factor of the spindle',
    result: exactly(factor, 'mPa·s a % torque'),
    values: { spindleConstant: constant, rpm, fullScalemPas: 100 * factor },
    // At full torque the answer is the full scale.
    input: { torquePercent: 100, spindleConstant: constant, rpm },
  })
}

function isPoints(points: unknown): points is { bufferPh: number; mV: number }[] {
  return (
    Array.isArray(points) &&
    points.every((point) => typeof point?.bufferPh === 'number' && typeof point?.mV === 'number')
  )
}
