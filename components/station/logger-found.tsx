import { Ledger } from '@/components/ui/ledger'
import { grouped } from '@/lib/number/rules'
import type { LoggerPreview } from '@/lib/station/schema'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

const delimiters: { [sign: string]: string } = { ';': 'semicolon', ',': 'comma', '\t': 'tab', '|': 'bar' }

/** What a file holds: how it was read, what is new, what is there already, and each bad row by its line. */
export function LoggerFound({ found }: { found: LoggerPreview }) {
  const { readAs, from, to, minC, maxC } = found
  const moment = (instant: string) => {
    const time = new Intl.DateTimeFormat('en-GB', { timeZone: readAs.zone, timeStyle: 'short' })
    return `${spokenDay(dayIn(readAs.zone, instant))}, ${time.format(new Date(instant))}`
  }
  return (
    <div className="grid gap-3 text-15">
      <div>
        <p className="text-17">
          <b>{grouped(found.freshRows, 0)} new</b>
          {found.knownRows > 0 ? `, ${grouped(found.knownRows, 0)} are on record already` : ''}
          {found.badRows > 0 ? (
            <b className="text-alarm">, {grouped(found.badRows, 0)} cannot be taken</b>
          ) : (
            ', none is bad'
          )}
          .
        </p>
        {from && to && minC !== null && maxC !== null ? (
          <p>
            From {moment(from)} to {moment(to)}, {degrees(minC)} to {degrees(maxC)} °C.
          </p>
        ) : null}
        <p className="text-soft">
          Columns parted by {delimiters[readAs.delimiter] ?? readAs.delimiter}; times as a clock in{' '}
          {readAs.zone} shows them.
        </p>
        {found.before ? (
          <p className="font-650">
            {found.before.by} took this very file on {moment(found.before.at)}.
          </p>
        ) : null}
        {found.notes.map((note) => (
          <p key={note}>{note}</p>
        ))}
      </div>
      {found.otherRows.length > 0 ? (
        <Ledger
          caption="Times with another temperature on record"
          rows={found.otherRows}
          rowKey={(row) => String(row.line)}
          columns={[
            { key: 'line', title: 'line', align: 'right', width: '64px', cell: (row) => row.line },
            { key: 'file', title: 'the file says', cell: (row) => `${degrees(row.temperatureC)} °C` },
            { key: 'record', title: 'on record, and stays', cell: (row) => `${degrees(row.knownC)} °C` },
          ]}
        />
      ) : null}
      {found.bad.length > 0 ? (
        <Ledger
          caption="Rows that cannot be taken"
          rows={found.bad.slice(0, 40)}
          rowKey={(row) => String(row.line)}
          columns={[
            { key: 'line', title: 'line', align: 'right', width: '64px', cell: (row) => row.line },
            { key: 'why', title: 'why not', cell: (row) => row.why },
            { key: 'text', title: 'as it stands', from: 'tablet', cell: (row) => row.text },
          ]}
        />
      ) : null}
    </div>
  )
}

function degrees(value: number): string {
  return grouped(value, 1)
}
