/** As a search compares names: without capitals and without the spaces around them. */
export function comparable(typed: string): string {
  return typed.trim().toLowerCase()
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
