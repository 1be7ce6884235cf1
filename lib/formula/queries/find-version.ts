import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** A version by its number, where there is one. */
export async function findVersion(db: Db, _actor: Actor, code: string, number: number) {
  if (!Number.isInteger(number) || number > 100_000) return null
  const found = await db
    .selectFrom('formulaVersion')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['formula.code', 'formulaVersion.id as versionId', 'formulaVersion.number as versionNumber'])
    .select('formulaVersion.state')
    .where('formula.code', '=', code)
    .where('formulaVersion.number', '=', number)
    .executeTakeFirst()
  return found ?? null
}
