import type { LineDifference } from '@/lib/formula/rules/difference'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'

type Line = NonNullable<LineDifference['from']>
type Props = { rows: LineDifference[]; names: [string, string] }

/** What is gone is struck through in soft, what is new stands in the weight of ink. */
export function LineDifferences({ rows, names }: Props) {
  return (
    <div className="relative overflow-x-auto" tabIndex={0} role="region" aria-label="Lines side by side">
      <table className="w-full border-collapse text-15">
        <caption className="sr-only">Lines side by side</caption>
        <thead>
          <tr className="border-b border-ink text-13 text-soft [&_th]:px-1 [&_th]:pb-1 [&_th]:font-430 sm:[&_th]:px-2">
            <th scope="col" className="hidden w-12 !pl-0 text-left sm:table-cell">
              phase
            </th>
            <th scope="col" className="text-left">
              INCI name
            </th>
            <th scope="col" className="text-right align-bottom sm:whitespace-nowrap">
              {names[0]}, %
            </th>
            <th scope="col" className="text-right align-bottom sm:whitespace-nowrap">
              {names[1]}, %
            </th>
            <th scope="col" className="text-left">
              what differs
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <Row key={index} row={row} />
          ))}
        </tbody>
      </table>
    </div>
  )
}

function Row({ row: { mark, from, to, fields } }: { row: LineDifference }) {
  const line = (to ?? from)!
  const isShareOther = mark !== 'same' && (mark !== 'changed' || fields.includes('percentThousandths'))
  return (
    <tr className="border-b border-hair align-baseline [&_td]:px-1 [&_td]:py-1.5 sm:[&_td]:px-2">
      <td className="hidden !pl-0 text-soft sm:table-cell">{line.phase}</td>
      <th
        scope="row"
        className={`py-1.5 pr-1 text-left sm:px-2 ${
          mark === 'removed' ? 'font-430 text-soft line-through' : mark === 'added' ? 'font-750' : 'font-430'
        }`}
      >
        {line.inciName.replaceAll('/', '/\u200b')}
      </th>
      <td className="whitespace-nowrap text-right">
        {from ? (
          <Share line={from} className={isShareOther ? 'text-soft line-through' : 'text-soft'} />
        ) : null}
      </td>
      <td className="whitespace-nowrap text-right">
        {to ? <Share line={to} className={isShareOther ? 'font-750' : ''} /> : null}
      </td>
      <td className="text-14">
        {mark === 'added' ? 'new' : mark === 'removed' ? 'gone' : null}
        {from && to && mark === 'changed' ? <Fields from={from} to={to} fields={fields} /> : null}
      </td>
    </tr>
  )
}

function Share({ line, className }: { line: Line; className: string }) {
  return (
    <span className={className}>
      {line.isRemainder ? <span className="text-13">q.s. </span> : null}
      {percentText(line.percentThousandths)}
    </span>
  )
}

type Fields = LineDifference['fields']

function Fields({ from, to, fields }: { from: Line; to: Line; fields: Fields }) {
  return (
    <ul>
      {fields
        .filter((field) => field !== 'isRemainder')
        .map((field) => (
          <li key={field}>
            {field === 'percentThousandths' ? (
              moved(to.percentThousandths - from.percentThousandths)
            ) : (
              <>
                {words[field]}{' '}
                <span className="text-soft line-through">{shown(from, field) || 'nothing'}</span>{' '}
                <b>{shown(to, field) || 'nothing'}</b>
              </>
            )}
          </li>
        ))}
      {fields.includes('isRemainder') ? (
        <li>{to.isRemainder ? 'now fills up to 100' : 'no longer fills up to 100'}</li>
      ) : null}
    </ul>
  )
}

const moved = (thousandths: number) =>
  `${thousandths > 0 ? '+' : '\u2212'}${percentText(Math.abs(thousandths))} %`

type Field = Exclude<Fields[number], 'isRemainder' | 'percentThousandths'>

const words: Record<Field, string> = {
  phase: 'phase',
  function: 'function',
  density: 'density',
  isInternal: 'stands',
  priceCentsPerKg: 'per kg',
}

function shown(line: Line, field: Field): string {
  if (field === 'isInternal') return line.isInternal ? 'inside' : 'outside'
  if (field === 'density') return `${line.density.toFixed(3)} g/mL`
  if (field === 'priceCentsPerKg')
    return line.priceCentsPerKg === null ? 'no price' : moneyText(line.priceCentsPerKg)
  return line[field]
}
