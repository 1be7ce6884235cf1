import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import type { MoveRow } from '@/lib/station/queries/moves'

/** Jars that came from another station or left for one. */
export function MovesPart({ moves, moment }: { moves: MoveRow[]; moment: (instant: string) => string }) {
  if (moves.length === 0) return null
  return (
    <Section title="Moved">
      <Ledger
        caption="Moves of jars"
        rows={moves}
        rowKey={(row) => row.id}
        columns={[
          { key: 'at', title: 'when', cell: (row) => moment(row.movedAt) },
          { key: 'jars', title: 'jars', align: 'right', cell: (row) => row.jars },
          { key: 'studies', title: 'of', from: 'tablet', cell: (row) => row.studies.join(', ') },
          { key: 'way', title: 'from and to', cell: (row) => `${row.fromName} to ${row.toName}` },
          { key: 'why', title: 'why', cell: (row) => row.reason },
          { key: 'who', title: 'by', from: 'tablet', cell: (row) => row.movedBy },
        ]}
      />
    </Section>
  )
}
