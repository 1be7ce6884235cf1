import { Ledger } from '@/components/ui/ledger'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { viscosityFactor } from '@/lib/science/viscosity'
import { shownValue } from '@/lib/study/rules/words'

/** What is measured, how, and how far it may move. */
export function AttributeList({ attributes }: { attributes: PlannedAttribute[] }) {
  return (
    <Ledger
      caption="Attributes"
      rows={attributes}
      rowKey={(row) => row.attribute}
      columns={[
        {
          key: 'attribute',
          title: 'attribute',
          cell: (row) => <b className="font-650">{attributeOf(row.attribute).label}</b>,
        },
        { key: 'tolerance', title: 'may be', cell: toleranceText },
        {
          key: 'replicates',
          title: 'replicates',
          align: 'right',
          from: 'tablet',
          cell: (row) => row.replicates,
        },
        { key: 'jar', title: 'jar', from: 'tablet', cell: (row) => attributeOf(row.attribute).jar },
        {
          key: 'method',
          title: 'method',
          cell: (row) =>
            row.viscosity ? (
              <>
                {row.method}
                <span className="text-soft">
                  ,{' '}
                  {shownValue('viscosity', viscosityFactor(row.viscosity.spindleConstant, row.viscosity.rpm))}{' '}
                  mPa·s a %
                </span>
              </>
            ) : (
              row.method
            ),
        },
      ]}
    />
  )
}

function toleranceText({ attribute, tolerance }: PlannedAttribute): string {
  const { unit } = attributeOf(attribute)
  if (tolerance.kind === 'range') {
    const shown = (value: number) => shownValue(attribute, value)
    const end = unit && !attributeOf(attribute).words ? ` ${unit}` : ''
    if (tolerance.lower === undefined) return `at most ${shown(tolerance.upper!)}${end}`
    if (tolerance.upper === undefined) return `at least ${shown(tolerance.lower)}${end}`
    return `${shown(tolerance.lower)} to ${shown(tolerance.upper)}${end}`
  }
  const what =
    tolerance.kind === 'percent' ? ' % of the initial' : `${unit ? ` ${unit}` : ''} from the initial`
  const { below, above } = tolerance
  if (below === above) return `within ${below}${what}`
  return [below === undefined ? '' : `${below} below`, above === undefined ? '' : `${above} above`]
    .filter(Boolean)
    .join(', ')
    .concat(what)
}
