import { createHash, randomBytes } from 'node:crypto'
import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'

export type TokenKind = 'invitation' | 'reset' | 'setup'

const hours: Record<TokenKind, number> = { invitation: 7 * 24, reset: 1, setup: 7 * 24 }

/** The secret leaves through the caller alone; the database keeps its hash. Earlier ones of its kind end. */
export async function createToken(trx: Trx, kind: TokenKind, personId: string | null): Promise<string> {
  const secret = kind === 'setup' ? codeToType() : randomBytes(24).toString('base64url')
  await trx
    .deleteFrom('token')
    .where('kind', '=', kind)
    .where('personId', 'is not distinct from', personId)
    .where('usedAt', 'is', null)
    .execute()
  await trx
    .insertInto('token')
    .values({
      id: newId(),
      kind,
      personId,
      hash: hashOf(kind, secret),
      expiresAt: sql<string>`app_now() + make_interval(hours => ${hours[kind]})`,
    })
    .execute()
  return secret
}

/** Valid once. Null where it is unknown, used, or too old. */
export async function spendToken(
  trx: Trx,
  kind: TokenKind,
  secret: string,
): Promise<{ personId: string | null } | null> {
  const spent = await trx
    .updateTable('token')
    .set({ usedAt: sql<string>`app_now()` })
    .where('kind', '=', kind)
    .where('hash', '=', hashOf(kind, secret))
    .where('usedAt', 'is', null)
    .where('expiresAt', '>', sql<string>`app_now()`)
    .returning('personId')
    .executeTakeFirst()
  return spent ?? null
}

/** Whose link this is, for the page that greets; it spends nothing. */
export async function findTokenPerson(db: Db, kind: TokenKind, secret: string) {
  const person = await db
    .selectFrom('token')
    .innerJoin('person', 'person.id', 'token.personId')
    .select(['person.name', 'person.email'])
    .where('token.kind', '=', kind)
    .where('token.hash', '=', hashOf(kind, secret))
    .where('token.usedAt', 'is', null)
    .where('token.expiresAt', '>', sql<string>`app_now()`)
    .where('person.isActive', '=', true)
    .executeTakeFirst()
  return person ?? null
}

// Read off a console and typed by hand: no letters that look like digits, 100 bits.
function codeToType(): string {
  const letters = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789'
  const code = [...randomBytes(20)].map((byte) => letters[byte % 32]).join('')
  return code.replace(/(.{5})(?=.)/g, '$1-')
}

function hashOf(kind: TokenKind, secret: string): string {
  const plain = kind === 'setup' ? secret.toUpperCase().replace(/[^A-Z0-9]/g, '') : secret.trim()
  return createHash('sha256').update(plain).digest('hex')
}
