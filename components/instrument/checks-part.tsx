import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import type { InstrumentPage } from '@/lib/instrument/queries/list'

type Props = { checks: InstrumentPage['checks']; moment: (at: string) => string }

/** The daily checks of an instrument, the newest first. */
export function ChecksPart({ checks, moment }: Props) {
  if (checks.length === 0) return null
  return (
    <Section title="Daily checks">
      <Ledger
        caption="Daily checks, newest first"
        rows={checks}
        rowKey={(row) => row.id}
        columns={[
          { key: 'at', title: 'when', cell: (row) => moment(row.checkedAt) },
          {
            key: 'result',
            title: 'result',
            cell: (row) => (
              <span className={row.result === 'doubtful' ? 'font-650 text-alarm' : ''}>{row.result}</span>
            ),
          },
          { key: 'read', title: 'read', align: 'right', cell: (row) => row.detail.read },
          {
            key: 'of',
            title: 'of',
            align: 'right',
            cell: (row) => Number(row.detail.expected.toPrecision(5)),
          },
          { key: 'sentence', title: 'what it showed', from: 'tablet', cell: (row) => row.detail.sentence },
          { key: 'lot', title: 'lot', from: 'desk', cell: (row) => row.lot ?? '' },
          { key: 'by', title: 'by', cell: (row) => row.initials },
        ]}
      />
    </Section>
  )
}
