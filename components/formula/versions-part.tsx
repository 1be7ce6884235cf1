import Link from 'next/link'
import { Ledger } from '@/components/ui/ledger'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'

export function VersionsPart({ formula }: { formula: FormulaPage }) {
  return (
    <Ledger
      caption={`Versions of ${formula.code}`}
      rows={formula.versions.toReversed()}
      rowKey={(version) => version.id}
      columns={[
        {
          key: 'number',
          title: 'version',
          width: '90px',
          cell: (version) => (
            <Link
              href={`/formulas/${formula.code}?version=${version.number}`}
              aria-current={version.number === formula.number ? 'page' : undefined}
              className={`underline-offset-4 hover:underline ${version.number === formula.number ? 'font-750' : 'font-650'}`}
            >
              {version.number}
            </Link>
          ),
        },
        {
          key: 'state',
          title: 'stands at',
          cell: (version) => (version.state === 'locked' ? 'locked, a batch uses it' : 'draft'),
        },
        { key: 'by', title: 'by', cell: (version) => version.createdBy },
        {
          key: 'batches',
          title: 'made as',
          cell: (version) => version.batchCodes.join(', ') || 'no batch yet',
        },
        {
          key: 'difference',
          title: 'what changed',
          cell: (version) =>
            version.number === formula.versions[0]?.number ? (
              <span className="text-soft">the first</span>
            ) : (
              <Link
                href={`/formulas/${formula.code}/difference?to=${version.number}`}
                className="underline underline-offset-4"
              >
                Difference<span className="sr-only"> of version {version.number} to the one before</span>
              </Link>
            ),
        },
        { key: 'note', title: 'why', from: 'tablet', cell: (version) => version.note },
      ]}
    />
  )
}
