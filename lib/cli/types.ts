import { spawn } from 'node:child_process'
import { readFile, writeFile, mkdtemp } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import pg from 'pg'
import { migrate } from '@/lib/db/migrator'

// Writes lib/db/types.ts from the schema that the migrations make, on a scratch database.
// With --check it only says whether the committed file still agrees.

const target = path.resolve(import.meta.dirname, '../db/types.ts')
const adminUrl =
  process.env['TEST_DATABASE_ADMIN_URL'] ?? 'postgres://stillstand_admin@127.0.0.1:54329/postgres'
const scratch = `stillstand_types_${process.pid}`

const admin = new pg.Client({ connectionString: adminUrl })
await admin.connect()
try {
  await admin.query(`create database ${scratch} owner stillstand_owner`)
  const ownerUrl = new URL(adminUrl)
  ownerUrl.username = 'stillstand_owner'
  ownerUrl.pathname = `/${scratch}`
  await migrate(ownerUrl.href)
  const generated = await generate(ownerUrl.href)
  if (!process.argv.includes('--check')) {
    await writeFile(target, generated)
    console.log(`Wrote ${path.relative(process.cwd(), target)}.`)
  } else if ((await readFile(target, 'utf8')) !== generated) {
    console.error(
      'lib/db/types.ts no longer agrees with migrations/. Run `npm run types` and commit the result.',
    )
    process.exitCode = 1
  }
} finally {
  await admin.query(`drop database if exists ${scratch} with (force)`)
  await admin.end()
}

async function generate(url: string): Promise<string> {
  const out = path.join(await mkdtemp(path.join(tmpdir(), 'stillstand-types-')), 'types.ts')
  await run('node_modules/.bin/kysely-codegen', [
    ...['--dialect', 'postgres', '--url', url, '--out-file', out, '--camel-case'],
    ...['--default-schema', 'public', '--exclude-pattern', 'kysely_*'],
    ...['--numeric-parser', 'number', '--date-parser', 'string'],
    ...['--type-mapping', JSON.stringify({ timestamptz: 'string', jsonb: 'unknown', int8: 'number' })],
    ...['--log-level', 'error'],
  ])
  await run('node_modules/.bin/prettier', [
    '--write',
    '--log-level',
    'error',
    '--config',
    '.prettierrc.json',
    out,
  ])
  return readFile(out, 'utf8')
}

function run(command: string, args: string[]): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { stdio: ['ignore', 'inherit', 'inherit'] })
    child.on('error', reject)
    child.on('exit', (code) => (code === 0 ? resolve() : reject(new Error(`${command} ended with ${code}`))))
  })
}
