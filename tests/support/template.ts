import { createHash } from 'node:crypto'
import { readdir, readFile } from 'node:fs/promises'
import path from 'node:path'
import pg from 'pg'
import { migrate, migrationsFolder } from '@/lib/db/migrator'
import { installJobs } from '@/lib/jobs/install'

export function adminUrl(): string {
  return process.env['TEST_DATABASE_ADMIN_URL'] ?? 'postgres://stillstand_admin@127.0.0.1:54329/postgres'
}

export function urlAs(role: string, database: string): string {
  const url = new URL(adminUrl())
  url.username = role
  url.password = ''
  url.pathname = `/${database}`
  return url.href
}

export async function withAdmin<T>(work: (admin: pg.Client) => Promise<T>): Promise<T> {
  const admin = new pg.Client({ connectionString: adminUrl() })
  await admin.connect()
  try {
    return await work(admin)
  } finally {
    await admin.end()
  }
}

/** The name carries the hash of what made it: a changed migration makes a new template, never a wrong one. */
export async function templateName(): Promise<string> {
  const hash = createHash('sha256')
  for (const file of (await readdir(migrationsFolder)).sort())
    hash.update(file).update(await readFile(path.join(migrationsFolder, file)))
  for (const file of ['queues.ts', 'install.ts'])
    hash.update(await readFile(path.join(migrationsFolder, '../lib/jobs', file)))
  return `stillstand_template_${hash.digest('hex').slice(0, 16)}`
}

/** Several test runs may start at once; one builds, the others wait on the advisory lock. */
export async function ensureTemplate(): Promise<string> {
  const name = await templateName()
  await withAdmin(async (admin) => {
    await admin.query("select pg_advisory_lock(hashtext('stillstand template'))")
    const { rows } = await admin.query('select 1 from pg_database where datname = $1', [name])
    if (rows.length > 0) return
    const half = `${name}_half`
    await admin.query(`drop database if exists ${half} with (force)`)
    await admin.query(`create database ${half} owner stillstand_owner`)
    await migrate(urlAs('stillstand_owner', half))
    await installJobs(urlAs('stillstand_owner', half))
    await admin.query(`alter database ${half} rename to ${name}`)
  })
  return name
}
