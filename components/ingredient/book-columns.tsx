import type { LedgerColumn } from '@/components/ui/ledger'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import type { BookRow } from '@/lib/ingredient/queries'
import { fromMemory, type IngredientBookQuery } from '@/lib/ingredient/schema'
import { bookAddress } from './book-address'

/** What a row of the book says; the name opens the whole entry. */
export function bookColumns(
  query: IngredientBookQuery,
  onOpen: (row: BookRow) => void,
): LedgerColumn<BookRow>[] {
  const sortBy = (sort: IngredientBookQuery['sort']) => {
    const isNow = query.sort === sort
    const order = isNow && query.order === 'asc' ? ('desc' as const) : ('asc' as const)
    return {
      href: bookAddress(query, { sort, order }),
      now: isNow ? (query.order === 'asc' ? ('up' as const) : ('down' as const)) : undefined,
    }
  }
  return [
    {
      key: 'inciName',
      title: 'INCI name',
      sort: sortBy('inciName'),
      cell: (row) => <Name row={row} onOpen={() => onOpen(row)} />,
    },
    {
      key: 'function',
      title: 'function',
      from: 'tablet',
      sort: sortBy('function'),
      cell: (row) => row.function,
    },
    { key: 'phase', title: 'phase', from: 'desk', cell: (row) => (row.isOilPhase ? 'oil' : 'water') },
    {
      key: 'density',
      title: 'g/mL',
      align: 'right',
      sort: sortBy('density'),
      cell: (row) => <Density row={row} />,
    },
    {
      key: 'range',
      title: 'usual % w/w',
      align: 'right',
      from: 'tablet',
      cell: (row) => <span className="whitespace-nowrap">{rangeText(row)}</span>,
    },
    {
      key: 'price',
      title: 'per kg',
      align: 'right',
      from: 'desk',
      sort: sortBy('price'),
      cell: (row) => (row.priceCentsPerKg === null ? '' : moneyText(row.priceCentsPerKg)),
    },
    {
      key: 'supplierName',
      title: 'supplier’s name for it',
      from: 'desk',
      sort: sortBy('supplierName'),
      cell: (row) => row.supplierName,
    },
    {
      key: 'usedIn',
      title: 'used in',
      align: 'right',
      cell: (row) => (
        <span className={`whitespace-nowrap ${row.usedIn ? '' : 'text-soft'}`}>
          {row.usedIn ? `${row.usedIn} ${row.usedIn === 1 ? 'formula' : 'formulas'}` : 'none yet'}
        </span>
      ),
    },
  ]
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

export function rangeText({
  percentLowThousandths: low,
  percentHighThousandths: high,
}: Pick<BookRow, 'percentLowThousandths' | 'percentHighThousandths'>): string {
  if (low === null && high === null) return ''
  if (low === null) return `at most ${percentText(high ?? 0)}`
  return high === null ? `from ${percentText(low)}` : `${percentText(low)} to ${percentText(high)}`
}
