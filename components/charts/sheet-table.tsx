import type { SheetProps } from './sheet-layout'
import { happenedIn, noted, rowName } from './sheet-names'
import { dayAfter, dayName, timeLabel, unitOf } from './time-scale'

/** The sheet as plain rows and columns, for reading aloud, for copying, for print. */
export function SheetTable({ sheet, caption }: { sheet: SheetProps; caption: string }) {
  const unit = unitOf(sheet.endWeeks)
  const points = [...new Set(sheet.rows.flatMap(({ cells }) => cells.map((cell) => cell.weeks)))].sort(
    (a, b) => a - b,
  )
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-14 [&_td]:border-b [&_td]:border-hair [&_td]:px-2 [&_td]:py-1.5 [&_th]:px-2 [&_th]:py-1.5">
        <caption className="pb-2 text-left text-13 text-soft">{caption}</caption>
        <thead className="bg-recess">
          <tr>
            <th scope="col" className="text-left">
              Station
            </th>
            <th scope="col" className="text-left">
              Standing
            </th>
            {points.map((weeks) => (
              <th key={weeks} scope="col" className="text-right font-600 whitespace-nowrap">
                {unit} {timeLabel(weeks, unit)}
                <span className="block text-13 font-430 text-soft">
                  {dayName(dayAfter(sheet.startOn, weeks))}
                </span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {sheet.rows.map((row) => (
            <tr key={row.id}>
              <th scope="row" className="border-b border-hair text-left whitespace-nowrap">
                {rowName(row)}
                <span className="block text-13 font-430 text-soft">{row.note}</span>
              </th>
              <td className={row.standing === 'out' || row.standing === 'leaning' ? 'text-alarm' : ''}>
                {row.standing}
              </td>
              {points.map((weeks) => {
                const cell = row.cells.find((one) => one.weeks === weeks)
                const isOut = cell?.posture === 'lying'
                return (
                  <td key={weeks} className={`text-right ${isOut ? 'font-700 text-alarm' : ''}`}>
                    {cell ? [cell.label || cell.state, ...noted(cell), ...happenedIn(cell)].join(', ') : ''}
                  </td>
                )
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
