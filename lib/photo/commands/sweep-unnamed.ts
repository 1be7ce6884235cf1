import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { storage } from '@/lib/files/storage'
import { hashOf, previewKey, sweptFolders } from '../rules/keys'

/** A server dies seldom between file and row: of more, the store belongs to another database, or to a later one. */
const mostAtOnce = 20
const askedAtOnce = 500

/**
 * Removes files that were stored whole and whose row never came, because the server died between the two. What any row
 * names stays, and so does what is younger than this; gives how many went.
 */
export async function sweepUnnamed(db: Db, olderThanMs: number): Promise<number> {
  const files = storage()
  const old: string[] = []
  for (const folder of sweptFolders)
    for await (const { key, storedAt } of files.list(folder))
      if (hashOf(key) && Date.now() - storedAt >= olderThanMs) old.push(key)
  const unnamed = await withoutRow(db, old)
  if (unnamed.length > mostAtOnce)
    throw new Error(
      `${unnamed.length} files in the store have no row. Nothing was removed: look whether this store belongs to this database, and whether the database is an older one that was restored.`,
    )
  let removed = 0
  for (const key of unnamed) if (await db.transaction().execute((trx) => isRemoved(trx, key))) removed += 1
  return removed
}

/** `keepWhole` holds the same lock from before it looks for the file until its row is there or its transaction undone. */
async function isRemoved(trx: Trx, key: string): Promise<boolean> {
  const { rows } = await sql<{ isMine: boolean }>`
    select pg_try_advisory_xact_lock(hashtextextended(${key}, 0)) as is_mine
  `.execute(trx)
  if (!rows[0]!.isMine || (await withoutRow(trx, [key])).length === 0) return false
  await storage().remove(key)
  await storage().remove(previewKey(hashOf(key)!))
  return true
}

/**
 * Asked of every table that keeps a file's hash, those of later migrations too: what is named anywhere is kept. One that
 * may not be read ends the sweep.
 */
async function withoutRow(db: Db, keys: readonly string[]): Promise<string[]> {
  const tables = await sql<{ name: string }>`
    select c.relname as name from pg_attribute a join pg_class c on c.oid = a.attrelid
    where a.attname = 'sha256' and not a.attisdropped and c.relkind in ('r', 'p')
      and c.relnamespace = 'public'::regnamespace
  `.execute(db)
  if (tables.rows.length === 0) throw new Error('No table names a file. Nothing was removed.')
  const found: string[] = []
  for (let from = 0; from < keys.length; from += askedAtOnce) {
    const some = keys.slice(from, from + askedAtOnce)
    const hashes = some.map((key) => hashOf(key)!)
    const named = new Set<string>()
    for (const { name } of tables.rows) {
      const { rows } = await sql<{ sha256: string }>`
        select sha256 from ${sql.table(name)} where sha256 = any(${hashes}::text[])
      `.execute(db)
      for (const { sha256 } of rows) named.add(sha256)
    }
    found.push(...some.filter((_, at) => !named.has(hashes[at]!)))
  }
  return found
}
