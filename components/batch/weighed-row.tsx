import { JarGlyph } from '@/components/marks/jar-glyph'
import { gramsText } from '@/lib/batch/rules/weighing'
import type { BatchPage } from '@/lib/batch/queries/get-batch'

type Line = BatchPage['weighings'][number]
type Props = {
  lines: Line[]
  current: string | null
  /** How far the line in hand is poured, 0 to 1. */
  poured: number
  isWater: (line: Line) => boolean
}

/** The batch as it fills: a jar for each line on its phase's shelf, dotted while it is still to weigh. */
export function WeighedRow({ lines, current, poured, isWater }: Props) {
  const phases = [...new Set(lines.map((line) => line.phase))]
  return (
    <div className="flex flex-wrap items-end gap-x-10 gap-y-3">
      {phases.map((phase) => {
        const own = lines.filter((line) => line.phase === phase)
        return (
          <div key={phase}>
            <div className="flex items-end gap-1.5 border-b-[3px] border-ink px-1">
              {own.map((line) => (
                <WeighedJar
                  key={line.id}
                  line={line}
                  isCurrent={line.id === current}
                  poured={poured}
                  isWater={isWater(line)}
                />
              ))}
            </div>
            <p className="mt-1 text-18">
              <b>{phase}</b> {own.some(isWater) ? 'water' : 'oil'},{' '}
              {gramsText(own.reduce((sum, line) => sum + line.targetG, 0))} g
            </p>
          </div>
        )
      })}
    </div>
  )
}

type JarProps = { line: Line; isCurrent: boolean; poured: number; isWater: boolean }

function WeighedJar({ line, isCurrent, poured, isWater }: JarProps) {
  if (line.actualG === null && !isCurrent) return <JarGlyph height={34} state="due" />
  if (isCurrent && poured <= 0) return <JarGlyph height={46} state="due" />
  const percent = isCurrent ? 100 * Math.max(0, Math.min(1, poured)) : 100
  const layer = isWater ? { bottomPercent: percent } : { topPercent: percent }
  return <JarGlyph height={isCurrent ? 46 : 34} open={isCurrent} {...layer} />
}
