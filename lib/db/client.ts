import { CamelCasePlugin, Kysely, PostgresDialect, type Transaction } from 'kysely'
import pg from 'pg'
import { databaseUrl } from '@/lib/env'
import type { DB } from './types'

export type Db = Kysely<DB>
/** What commands take: a plain Db does not satisfy it, so forgetting the transaction does not compile. */
export type Trx = Transaction<DB>

const { builtins } = pg.types
const asNumber = (text: string) => Number(text)
const asText = (text: string) => text
// 2026-03-02 10:00:00.123+00 -> 2026-03-02T10:00:00.123Z
const asInstant = (text: string) =>
  new Date(text.replace(' ', 'T').replace(/([+-]\d\d)$/, '$1:00')).toISOString()
const each = (parse: (text: string) => unknown) => (text: string) =>
  pg.types.arrayParser(text, (item: string) => parse(item))

const parsers = new Map<number, (text: string) => unknown>([
  [builtins.INT8, asNumber],
  [builtins.NUMERIC, asNumber],
  [builtins.DATE, asText],
  [builtins.TIMESTAMPTZ, asInstant],
  [1016, each(asNumber)],
  [1231, each(asNumber)],
  [1182, each(asText)],
  [1185, each(asInstant)],
])

// On the pool and not global: lucia and pg-boss expect pg's own parsers.
const types = {
  getTypeParser: ((oid: number, format?: 'text' | 'binary') =>
    parsers.get(oid) ?? pg.types.getTypeParser(oid, format)) as typeof pg.types.getTypeParser,
}

export function createPool(connectionString: string, max = 10): pg.Pool {
  const pool = new pg.Pool({
    connectionString,
    max,
    types,
    connectionTimeoutMillis: 5_000,
    options: '-c timezone=UTC',
    application_name: 'stillstand',
  })
  // A connection that breaks while idle is replaced; without a listener it would end the process.
  pool.on('error', () => undefined)
  return pool
}

export function createDb(pool: () => pg.Pool): Db {
  return new Kysely<DB>({
    dialect: new PostgresDialect({ pool: async () => pool() }),
    plugins: [new CamelCasePlugin({ maintainNestedObjectKeys: true })],
  })
}

// On globalThis because the development server evaluates modules anew after each edit.
const shared = globalThis as typeof globalThis & { stillstandPool?: pg.Pool }

/** Made at first use, so that importing a module never needs a database (the build imports them all). */
export function appPool(): pg.Pool {
  shared.stillstandPool ??= createPool(databaseUrl('app'))
  return shared.stillstandPool
}

export const db: Db = createDb(appPool)
