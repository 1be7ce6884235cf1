import type { GramsTo } from '@/lib/batch/rules/size'
import { grouped } from '@/lib/number/rules'

type Props = {
  needs: { name: string; grams: number; parts: GramsTo[] }[]
  sizeG: number
  neededG: number
}

/** Every gram of the batch on one scale: a line for each kind of jar, as long as what it takes. */
export function GramsDrawn({ needs, sizeG, neededG }: Props) {
  const rows = [
    ...needs.flatMap((need) =>
      need.parts.map((part, index) => ({ ...part, protocol: index === 0 ? need.name : '', isLost: false })),
    ),
    { name: 'stays in the vessel', jars: 0, grams: Math.max(0, sizeG - neededG), protocol: '', isLost: true },
  ]
  return (
    <table className="w-full border-collapse text-15">
      <caption className="sr-only">Where the grams go</caption>
      <tbody>
        {rows.map((row, index) => (
          <tr key={index} className="border-b border-hair">
            <th scope="row" className="w-[42%] py-1.5 text-left font-430">
              {row.protocol ? <b className="block">{row.protocol}</b> : null}
              {row.jars ? `${row.jars} ${row.name}` : row.name}
            </th>
            <td className="py-1.5 align-bottom">
              <svg viewBox="0 0 200 12" preserveAspectRatio="none" className="h-3 w-full" aria-hidden>
                <path
                  d={`M0 6H${Math.max(1, (row.grams / sizeG) * 200)}`}
                  stroke={row.isLost ? 'var(--rule)' : 'var(--ink)'}
                  strokeWidth={row.isLost ? 2 : 10}
                />
              </svg>
            </td>
            <td className="whitespace-nowrap py-1.5 pl-4 text-right align-bottom">
              {grouped(row.grams, 0)} g
            </td>
          </tr>
        ))}
        <tr className="border-t-2 border-ink">
          <th scope="row" className="py-1.5 text-left font-650">
            In all
          </th>
          <td />
          <td className="whitespace-nowrap py-1.5 pl-4 text-right font-650">{grouped(sizeG, 0)} g</td>
        </tr>
      </tbody>
    </table>
  )
}
