import { labWith, lotionRepeatability, narrowTolerances, packedCreamRepeatability, type Lab } from '../lab'
import { coverage } from './coverage'
import type { Figure } from './figure'
import { offDays, slips } from './instrument'
import { afterLag, onsetTime } from './separating'
import { drift, harmless, unchanging } from './steady'

export const attributes = ['ph', 'viscosity', 'separation'] as const
export const shapes = ['linear', 'first order'] as const
/** Planned length, and the latest week in which a drift leaves. */
export const lengths = [
  { weeks: 26, latest: 24 },
  { weeks: 52, latest: 48 },
] as const

export const packed = 'packed cream, '
export const narrow = 'narrow bands, '

function drifts(lab: Lab, prefix: string, weeks: number, latest: number, studies: number): Figure[] {
  return attributes.flatMap((attribute) =>
    shapes.map((shape) =>
      drift(`${prefix}drift ${attribute} ${shape} ${weeks}`, lab[attribute], weeks, shape, latest, studies),
    ),
  )
}

/** Every figure of the table, each over at least `studies` studies; the order fixes the seeds. */
export function allFigures(studies: number): Figure[] {
  const lab = labWith(lotionRepeatability)
  const cream = labWith(packedCreamRepeatability)
  return [
    unchanging('unchanging 26', lab, 26, studies),
    unchanging('unchanging 52', lab, 52, studies),
    harmless('harmless linear', lab, 26, 'linear', studies),
    harmless('harmless settling', lab, 26, 'settling', studies),
    ...lengths.flatMap(({ weeks, latest }) => drifts(lab, '', weeks, latest, studies)),
    afterLag('after a lag', lab.separation, 26, studies),
    offDays('off days', lab, 26, studies),
    slips('slips', lab, 26, studies),
    onsetTime('onset', lab.separation, 26, [1, 4], studies),
    onsetTime('slow onset', lab.separation, 26, [0.3, 1], studies),
    coverage('coverage', 5 * studies),
    unchanging(`${packed}unchanging 26`, cream, 26, studies),
    ...drifts(cream, packed, 26, 24, studies),
    offDays(`${packed}off days`, cream, 26, studies),
    unchanging(`${narrow}unchanging 26`, labWith(lotionRepeatability, narrowTolerances), 26, studies),
  ]
}
