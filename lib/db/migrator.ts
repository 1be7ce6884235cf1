import { readdir } from 'node:fs/promises'
import path from 'node:path'
import { pathToFileURL } from 'node:url'
import { Kysely, Migrator, PostgresDialect, sql, type Migration } from 'kysely'
import pg from 'pg'

export const migrationsFolder = path.resolve(import.meta.dirname, '../../migrations')

/**
 * Forward only. Kysely holds an advisory lock, so of two servers starting at once one migrates and one waits. `until`
 * stops after that migration, to make a database as an earlier release left it.
 */
export async function migrate(ownerUrl: string, until?: string): Promise<string[]> {
  const db = new Kysely<unknown>({
    dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: ownerUrl, max: 2 }) }),
  })
  try {
    await assertRoles(db)
    const migrator = new Migrator({ db, provider: { getMigrations: readMigrations } })
    const { error, results } = await (until === undefined
      ? migrator.migrateToLatest()
      : migrator.migrateTo(until))
    if (error) {
      const failed = results?.find((result) => result.status === 'Error')?.migrationName
      const why = error instanceof Error ? error.message : String(error)
      throw new Error(
        failed ? `Migration ${failed} failed and was undone: ${why}` : `Migrating failed: ${why}`,
        {
          cause: error,
        },
      )
    }
    return (results ?? [])
      .filter((result) => result.status === 'Success')
      .map((result) => result.migrationName)
  } finally {
    await db.destroy()
  }
}

// Not Kysely's own file provider: it imports from inside node_modules, where .ts is not understood.
async function readMigrations(): Promise<Record<string, Migration>> {
  const files = (await readdir(migrationsFolder)).filter((file) => /^\d{4}_[a-z0-9_]+\.ts$/.test(file)).sort()
  const found: Record<string, Migration> = {}
  for (const file of files) {
    const address = pathToFileURL(path.join(migrationsFolder, file)).href
    found[file.replace(/\.ts$/, '')] = (await import(/* @vite-ignore */ address)) as Migration
  }
  return found
}

async function assertRoles(db: Kysely<unknown>): Promise<void> {
  const { rows } = await sql<{ rolname: string }>`
    select rolname from pg_roles where rolname in ('stillstand_app', 'stillstand_seed')
  `.execute(db)
  for (const role of ['stillstand_app', 'stillstand_seed']) {
    if (rows.some((row) => row.rolname === role)) continue
    throw new Error(
      `The database server has no role ${role}. Run as an administrator: create role ${role}; ` +
        `then grant it to the login that ${role === 'stillstand_app' ? 'DATABASE_URL' : 'DATABASE_SEED_URL'} names.`,
    )
  }
}
