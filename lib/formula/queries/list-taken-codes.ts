import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** Codes that begin as this one does, so that others can be proposed. */
export async function listTakenCodes(db: Db, _actor: Actor, code: string): Promise<string[]> {
  const begins = `${code
    .slice(0, 17)
    .toLowerCase()
    .replace(/[\\%_]/g, '\\$&')}%`
  const rows = await db
    .selectFrom('formula')
    .select('code')
    .where(sql<string>`lower(code)`, 'like', begins)
    .execute()
  return rows.map((row) => row.code)
}
