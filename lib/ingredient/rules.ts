import { percentText } from '@/lib/formula/rules/numbers'
import { choice, describeList } from '@/lib/list/schema'
import type { BookRow } from './queries'

/** As names are compared: without capitals, and with one space where there are several or none at the ends. */
export function comparable(typed: string): string {
  return typed.trim().replace(/\s+/g, ' ').toLowerCase()
}

export type Match = { in: 'synonym' | 'supplier'; text: string }

/** Which name a search found an ingredient by, where it was not the INCI name. */
export function matchOf(
  row: { inciName: string; synonyms: readonly string[]; supplierName: string },
  typed: string,
): Match | null {
  const sought = comparable(typed)
  if (!sought || row.inciName.toLowerCase().includes(sought)) return null
  const synonym = row.synonyms.find((name) => name.toLowerCase().includes(sought))
  if (synonym) return { in: 'synonym', text: synonym }
  return row.supplierName.toLowerCase().includes(sought) ? { in: 'supplier', text: row.supplierName } : null
}

type Names = { inciName: string; synonyms: readonly string[]; supplierName: string }

/**
 * The ingredient that a name stands for: by INCI name, else by a synonym, else by the supplier's own name for it. Null
 * where none has it, or several have and only a person can tell.
 */
export function findNamed<Row extends Names>(
  rows: readonly Row[],
  name: string,
): { row: Row; match: Match | null } | null {
  const sought = comparable(name)
  const isIt = (other: string) => comparable(other) === sought
  const [byName] = rows.filter((row) => isIt(row.inciName))
  if (byName) return { row: byName, match: null }
  const bySynonym = rows.filter((row) => row.synonyms.some(isIt))
  const found = bySynonym.length ? bySynonym : rows.filter((row) => isIt(row.supplierName))
  if (found.length !== 1 || !found[0]) return null
  return { row: found[0], match: { in: bySynonym.length ? 'synonym' : 'supplier', text: name.trim() } }
}

/** Each synonym once, and none that is the INCI name itself. */
export function tidySynonyms(inciName: string, synonyms: readonly string[]): string[] {
  const seen = new Set([comparable(inciName)])
  return synonyms.filter((name) => {
    const key = comparable(name)
    if (!key || seen.has(key)) return false
    seen.add(key)
    return true
  })
}

export const ingredientList = describeList<BookRow>()({
  name: 'ingredients',
  sort: 'inciName',
  columns: [
    { key: 'inciName', title: 'INCI name', sort: 'text', value: (row) => row.inciName },
    { key: 'function', title: 'function', sort: 'text', value: (row) => row.function },
    { key: 'phase', title: 'phase', value: (row) => (row.isOilPhase ? 'oil' : 'water') },
    { key: 'density', title: 'g/mL', kind: 'number', sort: 'number', value: (row) => row.density },
    { key: 'range', title: 'usual % w/w', value: rangeText },
    {
      key: 'price',
      title: 'per kg',
      kind: 'number',
      sort: 'number',
      value: (row) => (row.priceCentsPerKg === null ? null : row.priceCentsPerKg / 100),
    },
    { key: 'supplierName', title: 'supplier’s name for it', sort: 'text', value: (row) => row.supplierName },
    { key: 'usedIn', title: 'used in', kind: 'number', value: (row) => row.usedIn },
    { key: 'synonyms', title: 'also called', isExtra: true, value: (row) => row.synonyms.join('; ') },
    {
      key: 'densitySource',
      title: 'density from',
      sort: 'text',
      isExtra: true,
      value: (row) => row.densitySource,
    },
    {
      key: 'melts',
      title: 'melts above, °C',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (row) => row.meltsAboveC,
    },
    {
      key: 'acid',
      title: 'acid value',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (row) => row.acidValue,
    },
    {
      key: 'base',
      title: 'base value',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (row) => row.baseValue,
    },
    { key: 'caution', title: 'caution', isExtra: true, value: (row) => row.caution },
    { key: 'note', title: 'note', isExtra: true, value: (row) => row.note },
  ],
  filters: {
    phase: choice('Phase', ['oil', 'water']),
    function: choice('Function'),
    source: choice('Density', ['from memory', 'with a source']),
  },
})

/** The share it is usually used at, in % w/w. */
export function rangeText({
  percentLowThousandths: low,
  percentHighThousandths: high,
}: Pick<BookRow, 'percentLowThousandths' | 'percentHighThousandths'>): string {
  if (low === null && high === null) return ''
  if (low === null) return `at most ${percentText(high ?? 0)}`
  return high === null ? `from ${percentText(low)}` : `${percentText(low)} to ${percentText(high)}`
}
