import type { IngredientBookQuery } from '@/lib/ingredient/schema'

/** What is shown stands in the address, so that a view can be shared and gone back to. */
export function bookAddress(query: IngredientBookQuery, next: Partial<IngredientBookQuery> = {}): string {
  // Anything but turning the page begins again at the first one.
  const { q, phase, function: fn, sort, order, page } = { ...query, page: 1, ...next }
  const search = new URLSearchParams({
    ...(q.trim() ? { q: q.trim() } : {}),
    ...(phase === 'any' ? {} : { phase }),
    ...(fn ? { function: fn } : {}),
    ...(sort === 'inciName' && order === 'asc' ? {} : { sort, order }),
    ...(page > 1 ? { page: String(page) } : {}),
  })
  return search.size > 0 ? `/ingredients?${search}` : '/ingredients'
}
