import type { StepDifference } from '@/lib/formula/rules/difference'
import { conditionsText } from './read-steps'

type Step = NonNullable<StepDifference['from']>
type Props = { rows: StepDifference[]; names: [string, string] }

/** The two processes beside each other, step by step. */
export function StepDifferences({ rows, names }: Props) {
  if (!rows.length) return <p className="text-15 text-soft">Neither has process steps.</p>
  return (
    <table className="w-full table-fixed border-collapse text-15">
      <caption className="sr-only">Process steps side by side</caption>
      <thead>
        <tr className="border-b border-ink text-13 text-soft [&_th]:pb-1 [&_th]:text-left [&_th]:font-430">
          <th scope="col" className="w-1/2 pr-4">
            {names[0]}
          </th>
          <th scope="col">{names[1]}</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ mark, from, to, fields }, index) => (
          <tr key={index} className="border-b border-hair align-top [&_td]:py-2">
            <td className={`pr-4 ${mark === 'same' ? '' : 'text-soft'}`}>
              {from ? (
                <Side step={from} fields={fields} isAll={mark === 'removed'} tone="line-through" />
              ) : (
                <span className="sr-only">not there</span>
              )}
            </td>
            <td>
              {to ? (
                <Side step={to} fields={fields} isAll={mark === 'added'} tone="font-750" />
              ) : (
                <span className="text-14 text-soft">gone</span>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}

type SideProps = { step: Step; fields: StepDifference['fields']; isAll: boolean; tone: string }

/** What is not the same in the other one carries the tone. */
function Side({ step, fields, isAll, tone }: SideProps) {
  const toneOf = (...own: StepDifference['fields']) =>
    isAll || own.some((field) => fields.includes(field)) ? tone : ''
  const conditions = conditionsText(step)
  return (
    <>
      <p>
        {step.phase ? <span className={toneOf('phase') || 'font-650'}>{step.phase}. </span> : null}
        <span className={toneOf('instruction')}>{step.instruction}</span>
      </p>
      {conditions ? (
        <p className={`text-14 ${toneOf('speedRpm', 'minutes', 'temperatureC')}`}>{conditions}</p>
      ) : null}
      {step.lookFor ? <p className={`text-14 ${toneOf('lookFor')}`}>Look for: {step.lookFor}</p> : null}
      {step.caution ? <p className={`text-14 ${toneOf('caution')}`}>{step.caution}</p> : null}
    </>
  )
}
