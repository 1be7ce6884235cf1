import { gramsText, percentOffText, weighed } from '@/lib/batch/rules'
import type { BatchPage } from '@/lib/batch/queries/get-batch'

type Line = BatchPage['weighings'][number]
type Props = { lines: Line[]; current: string | null; isOpen: boolean; onPick: (id: string) => void }

/** The sheet in order: what was weighed with its difference, the one in hand, what is still to weigh. */
export function WeighList({ lines, current, isOpen, onPick }: Props) {
  return (
    <table className="w-full border-collapse text-16">
      <caption className="sr-only">Weighing sheet</caption>
      <thead>
        <tr className="border-b-2 border-ink">
          <th scope="col" className="py-1.5 text-left font-700">
            Weighed, then to weigh
          </th>
          <th scope="col" className="text-right font-700">
            g
          </th>
          <th scope="col" className="text-right font-430">
            off by
          </th>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <WeighRow
            key={line.id}
            line={line}
            isCurrent={line.id === current}
            isOpen={isOpen}
            onPick={onPick}
          />
        ))}
      </tbody>
    </table>
  )
}

function WeighRow({
  line,
  isCurrent,
  isOpen,
  onPick,
}: { line: Line; isCurrent: boolean } & Omit<Props, 'lines' | 'current'>) {
  const verdict = line.actualG === null ? null : weighed(line.targetG, line.actualG)
  return (
    <tr
      aria-current={isCurrent ? 'true' : undefined}
      className={`border-b border-hair align-middle ${isCurrent ? 'bg-typed font-650 outline-[2.5px] -outline-offset-1 outline-ink outline-solid' : ''}`}
    >
      <th scope="row" className="p-0 text-left font-[inherit]">
        {isOpen ? (
          <button
            type="button"
            onClick={() => onPick(line.id)}
            className="min-h-[var(--hit)] w-full py-1 pl-2 text-left leading-tight [overflow-wrap:anywhere]"
          >
            <Name line={line} />
          </button>
        ) : (
          <span className="block py-2 pl-2 leading-tight">
            <Name line={line} />
          </span>
        )}
      </th>
      <td className="whitespace-nowrap pr-2 text-right">
        {verdict ? (
          <b>{gramsText(line.actualG ?? 0)}</b>
        ) : (
          `${isCurrent ? 'of ' : ''}${gramsText(line.targetG)}`
        )}
      </td>
      <td
        className={`whitespace-nowrap pr-2 text-right ${verdict && !verdict.isWithin ? 'font-650 text-alarm' : ''}`}
      >
        {verdict ? percentOffText(verdict.differencePercent) : ''}
      </td>
    </tr>
  )
}

function Name({ line }: { line: Line }) {
  const detail = [
    line.lot ? `lot ${line.lot}` : '',
    line.balance ? `balance ${line.balance}` : '',
    line.weighedBy ? `by ${line.weighedBy}` : '',
    line.note,
  ]
    .filter(Boolean)
    .join(', ')
  return (
    <>
      {line.inciName.replaceAll('/', '/\u200b')}
      {detail ? <span className="block text-14 font-430 text-soft">{detail}</span> : null}
    </>
  )
}
