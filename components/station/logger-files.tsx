import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { grouped } from '@/lib/number/rules'
import type { LoggerFileRow } from '@/lib/station/queries/record'

/** Which files the record came from, each with its hash: the file itself is kept as it was. */
export function LoggerFiles({ files, moment }: { files: LoggerFileRow[]; moment: (at: string) => string }) {
  if (files.length === 0) return null
  return (
    <Section title="Loggers' files">
      <Ledger
        caption="Files taken, newest first"
        rows={files}
        rowKey={(row) => row.id}
        columns={[
          { key: 'name', title: 'file', cell: (row) => row.originalName || 'without a name' },
          { key: 'rows', title: 'taken', align: 'right', cell: (row) => grouped(row.takenRows, 0) },
          {
            key: 'bad',
            title: 'bad',
            align: 'right',
            from: 'tablet',
            cell: (row) => grouped(row.badRows, 0),
          },
          { key: 'from', title: 'from', from: 'desk', cell: (row) => moment(row.fromAt) },
          { key: 'to', title: 'to', from: 'desk', cell: (row) => moment(row.toAt) },
          {
            key: 'hash',
            title: 'SHA-256',
            from: 'tablet',
            cell: (row) => (
              <span className="font-mono text-13" title={row.sha256}>
                {row.sha256.slice(0, 16)}
              </span>
            ),
          },
          { key: 'when', title: 'kept', cell: (row) => moment(row.recordedAt) },
          { key: 'by', title: 'by', cell: (row) => row.initials },
        ]}
      />
    </Section>
  )
}
