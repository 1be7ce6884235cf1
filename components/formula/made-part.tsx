import Link from 'next/link'
import { Empty } from '@/components/ui/empty'
import { Ledger } from '@/components/ui/ledger'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { grouped } from '@/lib/number/rules'

/** The batches that were made of this formula, of any version. */
export function MadePart({ formula }: { formula: FormulaPage }) {
  return (
    <Ledger
      caption={`Batches of ${formula.code}`}
      rows={formula.batches}
      rowKey={(batch) => batch.code}
      isQuiet={(batch) => batch.state === 'rejected'}
      empty={
        <Empty
          title={`No batch of ${formula.code} yet`}
          sentence="The batches made of it stand here, with what each of them gave."
        />
      }
      columns={[
        {
          key: 'code',
          title: 'batch',
          cell: (batch) => (
            <Link href={`/batches/${batch.code}`} className="font-650 underline-offset-4 hover:underline">
              {batch.code}
            </Link>
          ),
        },
        { key: 'version', title: 'version', align: 'right', cell: (batch) => batch.versionNumber },
        { key: 'size', title: 'size, g', align: 'right', cell: (batch) => grouped(batch.sizeG, 0) },
        {
          key: 'yield',
          title: 'yield, g',
          align: 'right',
          cell: (batch) => (batch.yieldG === null ? '' : grouped(batch.yieldG, 0)),
        },
        { key: 'state', title: 'stands at', cell: (batch) => batch.state },
      ]}
    />
  )
}
