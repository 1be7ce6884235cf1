import Link from 'next/link'
import { FlagMark } from '../marks/flag-mark'
import { hasRoomFor } from './sheet-layout'
import type { SheetFlag, SheetLayout, SheetRow } from './sheet-layout'
import { rowName } from './sheet-names'

/** Flags and their sentences in the unspent time to the right, or above the jars where none is left. */
export function SheetFlags({ layout, stationWidth }: { layout: SheetLayout; stationWidth: number }) {
  return layout.rows.flatMap((placed) => {
    const { frontForecastWeeks: forecast } = placed.row
    const left = hasRoomFor(placed, layout.right) ? placed.unspentX : stationWidth - 14
    // The day stands beside the front's own line, so that the line does not cross it out.
    const beside = ({ sentence }: SheetFlag): number | null => {
      if (typeof forecast !== 'number') return null
      const from = layout.scale.x(forecast) + 14 - left
      return from > 44 + sentence.length * 7.8 && from < layout.right - left - 210 ? from : null
    }
    return placed.flags.map((flag, index) => (
      <p
        key={flag.number}
        className="absolute flex h-[22px] items-center gap-[11px] pl-px text-16 leading-none"
        style={{ left, top: placed.top + 1 + index * 22, width: layout.right - left }}
      >
        <FlagMark number={flag.number} solid={flag.level === 'out'} className="scale-95" />
        <span className="truncate leading-[22px]" title={flag.sentence}>
          {flag.sentence}
          {flag.strong && !beside(flag) ? <b className="ml-2 font-650 text-alarm">{flag.strong}</b> : null}
        </span>
        {flag.strong && beside(flag) ? (
          <b className="absolute font-650 text-alarm" style={{ left: beside(flag) ?? 0 }}>
            {flag.strong}
          </b>
        ) : null}
        <Link
          href={flag.href}
          className="ml-auto shrink-0 font-650 underline underline-offset-2"
          aria-label={`Answer flag ${flag.number}`}
        >
          Answer
        </Link>
      </p>
    ))
  })
}

/** The same flags as lines below the sheet, where the screen is too narrow for them beside the jars. */
export function SheetFlagList({ rows, flags }: { rows: SheetRow[]; flags: SheetFlag[] }) {
  if (flags.length === 0) return null
  return (
    <ul className="border-t border-hair">
      {flags.map((flag) => {
        const row = rows.find((one) => one.id === flag.rowId)
        return (
          <li key={flag.number} className="flex items-start gap-3 border-b border-hair py-2.5">
            <FlagMark number={flag.number} solid={flag.level === 'out'} className="mt-0.5" />
            <span className="min-w-0 flex-1">
              {row ? <b className="font-650">{rowName(row)}: </b> : null}
              {flag.sentence} {flag.strong ? <b className="font-650 text-alarm">{flag.strong}</b> : null}
            </span>
            <Link
              href={flag.href}
              className="relative shrink-0 font-650 underline underline-offset-2 after:absolute after:-inset-3 after:content-['']"
              aria-label={`Answer flag ${flag.number}`}
            >
              Answer
            </Link>
          </li>
        )
      })}
    </ul>
  )
}
