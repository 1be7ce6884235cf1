import type { CurveInput } from './curve-data'
import { curveName } from './curve-geometry'
import { dayAfter, dayName, timeLabel, unitOf } from './time-scale'

/** What a plot shows, as rows of times and columns of stations. */
export function CurveTable({
  input,
  startOn,
  endWeeks,
}: {
  input: CurveInput
  startOn: string
  endWeeks: number
}) {
  const unit = unitOf(endWeeks)
  const times = [...new Set(input.series.flatMap(({ points }) => points.map(({ weeks }) => weeks)))].sort(
    (a, b) => a - b,
  )
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-14 [&_td]:border-b [&_td]:border-hair [&_td]:px-2 [&_td]:py-1.5 [&_th]:px-2 [&_th]:py-1.5">
        <caption className="pb-2 text-left text-13 text-soft">
          {[input.title, ...input.unit].join(', ')}
          {input.band ? `. Band: ${input.band.text}.` : '.'} A reading in doubt is struck through.
        </caption>
        <thead className="bg-recess">
          <tr>
            <th scope="col" className="text-left">
              {unit}
            </th>
            {input.series.map((series) => (
              <th key={series.id} scope="col" className="text-right">
                {curveName(series)}
                <span className="block text-13 font-430">{series.beside ? 'beside' : series.standing}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {times.map((weeks) => (
            <tr key={weeks}>
              <th scope="row" className="border-b border-hair text-left font-430 whitespace-nowrap">
                <b>{timeLabel(weeks, unit)}</b> {dayName(dayAfter(startOn, weeks), true)}
              </th>
              {input.series.map((series) => (
                <td key={series.id} className="text-right">
                  {series.points
                    .filter((point) => point.weeks === weeks)
                    .map((point, index) => (
                      <span key={index} className="block">
                        {point.doubt ? <s title={point.doubt}>{point.text}</s> : point.text}
                      </span>
                    ))}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
