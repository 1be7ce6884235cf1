'use client'

import { useState } from 'react'
import { FigureDetails } from '@/components/ui/figure-details'
import { gramsIn, gramsText, percentOffText, weighed } from '@/lib/batch/rules/weighing'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { weighingFacts } from './batch-facts'
import { OffMark } from './off-mark'

type Line = BatchPage['weighings'][number]
type Props = {
  lines: Line[]
  tolerancePercent: number
  current: string | null
  isOpen: boolean
  isBench: boolean
  onPick: (id: string) => void
}

/** The sheet in order: what was weighed with its difference, the one in hand, what is still to weigh. */
export function WeighList({ lines, tolerancePercent, current, isOpen, isBench, onPick }: Props) {
  const [isWhole, setIsWhole] = useState(false)
  const at = lines.findIndex((line) => line.id === current)
  // At the Bench the number in hand must stay on the screen, so only the lines about it are shown first.
  const isWindow = isBench && at >= 0 && !isWhole
  const from = Math.max(0, Math.min(at - 3, lines.length - 7))
  const shown = isWindow ? lines.slice(from, from + 7) : lines
  return (
    <>
      <table className="w-full border-collapse text-16">
        <caption className="sr-only">Weighing sheet</caption>
        <thead>
          <tr className="border-b-2 border-ink">
            <th scope="col" className="py-1.5 text-left font-700">
              Weighed, then to weigh
            </th>
            <th scope="col" className="pr-2 text-right font-700">
              g
            </th>
            <th scope="col" className="whitespace-nowrap pl-3 pr-2 text-right font-430">
              off by
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.map((line) => (
            <WeighRow
              key={line.id}
              line={line}
              tolerancePercent={tolerancePercent}
              isCurrent={line.id === current}
              isOpen={isOpen && !isWindow}
              isBench={isBench}
              onPick={onPick}
            />
          ))}
        </tbody>
      </table>
      {isBench && at >= 0 ? (
        <button
          type="button"
          aria-expanded={isWhole}
          onClick={() => setIsWhole(!isWhole)}
          className="min-h-16 w-full text-left text-18 underline underline-offset-4"
        >
          {isWhole ? 'Only the lines about this one' : `All ${lines.length} lines, to pick another`}
        </button>
      ) : null}
    </>
  )
}

function WeighRow({
  line,
  tolerancePercent,
  isCurrent,
  isOpen,
  isBench,
  onPick,
}: { line: Line; isCurrent: boolean } & Omit<Props, 'lines' | 'current'>) {
  const verdict = line.actualG === null ? null : weighed(line.targetG, line.actualG, tolerancePercent)
  return (
    <tr
      aria-current={isCurrent ? 'true' : undefined}
      className={`border-b border-hair align-middle ${isCurrent ? 'bg-typed font-650 outline-[2.5px] -outline-offset-1 outline-ink outline-solid' : ''}`}
    >
      <th scope="row" className={`p-0 text-left ${isCurrent ? 'font-700' : 'font-430'}`}>
        {isOpen ? (
          <button
            type="button"
            onClick={() => onPick(line.id)}
            className="min-h-[var(--hit)] w-full py-1 pl-2 text-left leading-tight [overflow-wrap:anywhere]"
          >
            <Name line={line} />
          </button>
        ) : (
          <span className="block py-1.5 pl-2 leading-tight">
            <Name line={line} />
          </span>
        )}
      </th>
      <td className="whitespace-nowrap pr-2 text-right">
        {verdict ? (
          <b>{gramsText(line.actualG ?? 0)}</b>
        ) : (
          `${line.portions.length ? `${gramsText(gramsIn(line.portions))} of ` : isCurrent ? 'of ' : ''}${gramsText(line.targetG)}`
        )}
      </td>
      <td
        className={`whitespace-nowrap pr-2 text-right ${verdict && !verdict.isWithin ? 'font-650 text-alarm' : ''}`}
      >
        {verdict && line.actualG !== null && !isBench ? (
          <FigureDetails
            figure={percentOffText(verdict.differencePercent)}
            facts={() => weighingFacts(line, line.actualG ?? 0, tolerancePercent)}
          />
        ) : verdict ? (
          percentOffText(verdict.differencePercent)
        ) : (
          ''
        )}
        {verdict ? (
          <span className="block text-14 leading-tight">
            <OffMark isWithin={verdict.isWithin} differenceG={verdict.differenceG} /> {verdict.told}
          </span>
        ) : null}
      </td>
    </tr>
  )
}

function Name({ line }: { line: Line }) {
  const detail = [
    line.lot ? `lot ${line.lot}` : '',
    line.balance ? `balance ${line.balance}` : '',
    line.actualG !== null && line.weighedBy ? `by ${line.weighedBy}` : '',
    line.portions.length > 1 ? `${line.portions.length} weighings` : '',
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
