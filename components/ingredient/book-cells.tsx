import type { ListLedger } from '@/components/list/list-ledger'
import { moneyText } from '@/lib/formula/rules/numbers'
import type { BookRow } from '@/lib/ingredient/queries'
import { rangeText } from '@/lib/ingredient/rules'
import { fromMemory } from '@/lib/ingredient/schema'

/** How a row of the book is drawn; the name opens the whole entry. */
export function bookCells(
  onOpen: (row: BookRow) => void,
): Parameters<typeof ListLedger<BookRow>>[0]['cells'] {
  return {
    inciName: { cell: (row) => <Name row={row} onOpen={() => onOpen(row)} /> },
    function: { from: 'tablet' },
    phase: { from: 'desk' },
    density: { cell: (row) => <Density row={row} /> },
    range: {
      align: 'right',
      from: 'tablet',
      cell: (row) => <span className="whitespace-nowrap">{rangeText(row)}</span>,
    },
    price: {
      from: 'desk',
      cell: (row) => (row.priceCentsPerKg === null ? '' : moneyText(row.priceCentsPerKg)),
    },
    supplierName: { from: 'desk' },
    usedIn: {
      cell: (row) => (
        <span className={`whitespace-nowrap ${row.usedIn ? '' : 'text-soft'}`}>
          {row.usedIn ? `${row.usedIn} ${row.usedIn === 1 ? 'formula' : 'formulas'}` : 'none yet'}
        </span>
      ),
    },
  }
}

function Name({ row, onOpen }: { row: BookRow; onOpen: () => void }) {
  return (
    <span className="flex flex-wrap items-baseline gap-x-3">
      <button
        type="button"
        onClick={onOpen}
        className="min-h-11 text-left sm:min-h-0 font-650 underline-offset-4 [overflow-wrap:anywhere] hover:underline"
      >
        {row.inciName.replaceAll('/', '/\u200b')}
      </button>
      {row.match ? (
        <span className="text-13 text-soft">
          {row.match.in === 'synonym' ? 'also' : 'supplier’s'} {row.match.text}
        </span>
      ) : null}
    </span>
  )
}

/** A figure from memory is set lighter than one with a source; the word stands with it for those who hear the page. */
function Density({ row }: { row: BookRow }) {
  const isMemory = row.densitySource === fromMemory
  return (
    <span className={isMemory ? 'text-soft' : 'font-650'} title={row.densitySource}>
      {row.density.toFixed(3)}
      <span className="sr-only">, {row.densitySource}</span>
    </span>
  )
}
