import { Ledger } from '@/components/ui/ledger'
import { toleranceText } from '@/lib/protocol/rules/words'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { methodText } from '@/lib/reading/rules/conditions'
import { attributeOf, attributeName } from '@/lib/reading/schema/attributes'
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
          cell: (row) => <b className="font-650">{attributeName(row.attribute)}</b>,
        },
        { key: 'tolerance', title: 'may be', cell: toleranceText },
        {
          key: 'replicates',
          title: 'replicates',
          align: 'right',
          from: 'tablet',
          cell: (row) => row.replicates,
        },
        { key: 'jar', title: 'jar', from: 'tablet', cell: (row) => attributeOf(row.attribute, row).jar },
        {
          key: 'method',
          title: 'method',
          cell: (row) =>
            row.viscosity ? (
              <>
                {methodText(row)}
                <span className="text-soft">
                  ,{' '}
                  {shownValue(
                    attributeOf('viscosity'),
                    viscosityFactor(row.viscosity.spindleConstant, row.viscosity.rpm),
                  )}{' '}
                  mPa·s a %
                </span>
              </>
            ) : (
              methodText(row)
            ),
        },
      ]}
    />
  )
}
