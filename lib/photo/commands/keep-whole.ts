import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'
import { storage } from '@/lib/files/storage'

/**
 * A file stored whole before the row that names it is written, in the same transaction. The lock is held until that ends,
 * so that the nightly sweep cannot take the file for one without a row meanwhile.
 */
export async function keepWhole(
  trx: Trx,
  key: string,
  source: string | Uint8Array,
  type: string,
): Promise<void> {
  await sql`select pg_advisory_xact_lock_shared(hashtextextended(${key}, 0))`.execute(trx)
  const files = storage()
  if (!(await files.has(key))) await files.put(key, source, type)
}
