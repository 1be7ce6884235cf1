import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { measured } from '@/lib/batch/rules/readings'
import { grouped } from '@/lib/number/rules'
import { centrifugeMethod } from '@/lib/science/methods/emulsion'
import { viscosityMethod } from '@/lib/science/methods/measures'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'

type Reading = BatchPage['readings'][number]

/** As the lab writes it: pH with two decimals, viscosity with three figures, words as they are. */
export function figureOf(attribute: Reading['attribute'], value: number): string {
  const { unit } = measured[attribute]
  const text =
    attribute === 'ph'
      ? value.toFixed(2)
      : attribute === 'viscosity'
        ? grouped(Number(value.toPrecision(3)), 0)
        : attribute === 'density'
          ? value.toFixed(3)
          : attribute === 'droplets'
            ? value.toPrecision(3)
            : String(value).replace('-', '\u2212')
  return unit ? `${text} ${unit}` : text
}

/** What a reading was come by with, in a few words. */
export function howRead({ detail, instrument, typed, attribute }: Reading): string {
  return [
    detail.path ? `${detail.path}${detail.ratio ? ` ${detail.ratio}` : ''}` : '',
    attribute === 'viscosity' && detail.spindle
      ? `${typed} % torque, ${detail.spindle}, ${detail.rpm ?? ''} rpm`
      : '',
    attribute === 'centrifuge'
      ? `${detail.rpm ?? ''} rpm, ${detail.radiusMm ?? ''} mm, ${detail.minutes ?? ''} min`
      : '',
    detail.sampleTemperatureC === undefined ? '' : `${detail.sampleTemperatureC} °C`,
    instrument ?? '',
  ]
    .filter(Boolean)
    .join(', ')
}

export function torqueFacts({ detail, value }: Reading): FigureFacts {
  const { torquePercent, spindleConstant, rpm } = detail
  return factsOf(viscosityMethod, {
    result: exactly(value ?? 0, 'mPa·s'),
    lines: [0],
    values: { torquePercent, spindleConstant, rpm },
    input: { torquePercent, spindleConstant, rpm },
  })
}

export function rcfFacts(detail: Reading['detail']): FigureFacts {
  const { rpm, radiusMm, rcf } = detail
  return factsOf(centrifugeMethod, {
    result: exactly(rcf ?? 0, 'times gravity'),
    values: { rpm, radiusMm },
    input: { rpm, radiusMm },
  })
}
