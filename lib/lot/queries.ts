import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import type { CertifiedValue } from '@/lib/science/certificate'

/** Bottles of buffer and check fluid, those in use first. */
export async function listLots(db: Db | Trx, _actor: Actor) {
  return lots(db).orderBy('isUsedUp').orderBy('kind').orderBy('name').orderBy('expiresOn').execute()
}
export type LotRow = Awaited<ReturnType<typeof listLots>>[number]

export async function findLots(db: Trx, ids: readonly string[]): Promise<LotRow[]> {
  return ids.length === 0 ? [] : lots(db).where('id', 'in', ids).execute()
}

function lots(db: Db | Trx) {
  return db
    .selectFrom('lot')
    .select(['id', 'kind', 'name', 'lot', 'expiresOn', 'openedOn', 'keepsDays', 'isUsedUp', 'version'])
    .select((eb) => eb.ref('certificate').$castTo<CertifiedValue[]>().as('certificate'))
}
