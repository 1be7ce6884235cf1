import { FormulaJar } from '@/components/charts/formula-jar'
import type { Amounts } from '@/lib/formula/rules/totals'
import { volumeShares } from '@/lib/science/volume-share'
import type { EmulsionType } from '@/lib/formula/schema'
import type { RowMiddles } from './use-row-middles'

type Props = {
  amounts: (Amounts & { id: string; inciName: string })[]
  emulsionType: EmulsionType
  middles: RowMiddles | null
}

/** The height of the sheet's head, under which the jar begins. */
const head = 24

/** The jar if it all came apart: each line a layer of its own volume, led to its row. */
export function ApartJar({ amounts, emulsionType, middles }: Props) {
  const shown = amounts.filter((line) => line.percentThousandths > 0 && line.density > 0)
  if (shown.length === 0) return null
  const shares = volumeShares(shown.map((line) => ({ mass: line.percentThousandths, density: line.density })))
  const waterInside = emulsionType !== 'oil-in-water'
  const layers = shown.map((line, i) => ({
    id: line.id,
    name: line.inciName,
    volumePercent: shares[i] ?? 0,
    phase: line.isInternal === waterInside ? ('water' as const) : ('oil' as const),
  }))
  const height = Math.max(320, (middles?.height ?? 560) - head)
  const targets = Object.fromEntries(Object.entries(middles?.targets ?? {}).map(([id, y]) => [id, y - head]))
  return (
    <figure className="hidden w-[120px] shrink-0 lg:block" style={{ paddingTop: head }}>
      <FormulaJar layers={layers} height={height} targets={targets} />
      <figcaption className="mt-2 pr-6 text-13 text-soft">
        The jar if it all came apart: each line a layer, by volume
      </figcaption>
    </figure>
  )
}
