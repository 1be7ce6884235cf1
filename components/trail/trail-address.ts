import { trailQuery } from '@/lib/trail/schema'

/** Which part of the record is shown; stands in the address. */
export type ShownTrail = { table: string | null; study: string | null; before: number | null }

export function readTrail(search: Record<string, string | string[] | undefined>): ShownTrail {
  const { table, before } = trailQuery.shape
  const study = search['study']
  return {
    table: table.catch(undefined).parse(search['table']) || null,
    study: typeof study === 'string' && study.trim() ? study.trim().slice(0, 40) : null,
    before: before.catch(undefined).parse(search['before']) ?? null,
  }
}

export function trailAddress({ table, study, before }: ShownTrail): string {
  const search = new URLSearchParams({
    ...(table ? { table } : {}),
    ...(study ? { study } : {}),
    ...(before ? { before: String(before) } : {}),
  })
  return search.size > 0 ? `/trail?${search}` : '/trail'
}
