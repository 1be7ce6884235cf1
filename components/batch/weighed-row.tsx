import { JarGlyph } from '@/components/marks/jar-glyph'
import { gramsText } from '@/lib/batch/rules'
import type { BatchPage } from '@/lib/batch/queries/get-batch'

type Line = BatchPage['weighings'][number]
type Props = { lines: Line[]; current: string | null; isWater: (line: Line) => boolean }

/** The batch as it fills: a jar for each line on its phase's shelf, dotted while it is still to weigh. */
export function WeighedRow({ lines, current, isWater }: Props) {
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

function WeighedJar({ line, isCurrent, isWater }: { line: Line; isCurrent: boolean; isWater: boolean }) {
  if (line.actualG === null && !isCurrent) return <JarGlyph height={34} state="due" />
  const percent = line.actualG === null ? 40 : 100
  const layer = isWater ? { bottomPercent: percent } : { topPercent: percent }
  return <JarGlyph height={isCurrent ? 46 : 34} open={isCurrent} {...layer} />
}
