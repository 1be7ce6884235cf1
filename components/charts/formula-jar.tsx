import { Figure } from '../marks/figure'
import { formulaJarShapes, LEADER_END } from './formula-jar-shapes'
import type { FormulaLayer } from './formula-jar-shapes'

/** The jar if it all came apart: each line a layer, by volume, with leader lines to the table's rows. */
export function FormulaJar({
  layers,
  height,
  targets,
}: {
  layers: FormulaLayer[]
  height: number
  /** By layer id: how far below the jar's mouth the middle of its row lies. */
  targets?: Record<string, number>
}) {
  return (
    <Figure
      shapes={formulaJarShapes(layers, height, targets)}
      view={{ x: 0, y: 0, width: targets ? LEADER_END : 72, height }}
      title={`The jar if it all came apart: ${layers
        .map(({ name, volumePercent }) => `${name} ${volumePercent.toFixed(1)} %`)
        .join(', ')} by volume`}
    />
  )
}
