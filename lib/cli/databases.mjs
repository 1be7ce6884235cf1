import { hasDatabase, makeDatabase } from './cluster/open.mjs'
import { run, script, StepFailure } from './steps.mjs'

// What a database goes through before it is served: made, migrated, filled with the demo once.

const name = 'stillstand'
// The demo is filled in here and gets the real name when complete, so that a killed filling leaves no half demo.
const filling = 'stillstand_filling'

/** The addresses of one database of our cluster for the three roles, as the programs read them. */
export function databaseUrls(cluster, database = name) {
  return {
    DATABASE_OWNER_URL: cluster.url('owner', database),
    DATABASE_URL: cluster.url('app', database),
    DATABASE_SEED_URL: cluster.url('seed', database),
  }
}

export async function migrate(root, env) {
  await run(process.execPath, script('lib/cli/migrate.ts'), {
    cwd: root,
    env,
    what: 'Migrating the database',
    todo: 'The database is as it was before the failed migration. The lines above say what to correct.',
    isLong: true,
  })
}

export async function seed(root, env, say) {
  const { lines } = await run(process.execPath, script('lib/cli/seed.ts'), {
    cwd: root,
    env,
    onLine: say,
    what: 'Filling the demo',
    todo: 'The lines above say why. Without the demo it starts with: STILLSTAND_DEMO=off npm start',
    isLong: true,
  })
  return lines.at(-1) ?? 'filled'
}

/** Whether the demo was filled in, there are people of another making, or nobody yet. */
export const demoStateQuery = `select case
  when exists (select from lab where demo_filled_at is not null) then 'filled'
  when exists (select from person where not is_system) then 'people'
  else 'empty' end as state`

/** Makes, migrates and, when wanted, fills the database of our own cluster. Returns whether the demo is in it. */
export async function prepareOwnDatabase({ cluster, root, env, wantsDemo, step }) {
  const isNew = !(await hasDatabase(cluster, name))
  const database = isNew && wantsDemo ? filling : name
  const urls = { ...env, ...databaseUrls(cluster, database) }
  await step('Database', async (say) => {
    if (database === filling) await cluster.query(`drop database if exists ${filling} with (force)`)
    if (isNew) await makeDatabase(cluster, database)
    say('migrating')
    await migrate(root, urls)
    return isNew ? 'made and migrated' : 'migrated'
  })
  if (!wantsDemo) return false
  const askState = () => cluster.query(demoStateQuery, database)
  return fillWhereEmpty(await askState(), step, async (say) => {
    const outcome = await seed(root, urls, say)
    if (database === filling) await cluster.query(`alter database ${filling} rename to ${name}`)
    return outcome
  })
}

/** Migrates, and fills only when told to, the database that DATABASE_URL names. Returns whether the demo is in it. */
export async function prepareGivenDatabase({ root, env, wantsDemo, step }) {
  const needed = wantsDemo ? ['DATABASE_OWNER_URL', 'DATABASE_SEED_URL'] : ['DATABASE_OWNER_URL']
  const missing = needed.filter((variable) => !env[variable])
  if (missing.length > 0) {
    throw new StepFailure(
      `DATABASE_URL is given, so no database is started here; then ${missing.join(' and ')} must be given too.`,
      'The owner migrates, the seeding role fills the demo. README.md has the table of all variables.',
    )
  }
  await step('Database', async (say) => {
    say('migrating')
    await migrate(root, env)
    return 'migrated, on the server that DATABASE_URL names'
  })
  if (!wantsDemo) return false
  const { stdout } = await run(process.execPath, script('lib/cli/demo-state.ts'), { cwd: root, env })
  return fillWhereEmpty(stdout.trim(), step, (say) => seed(root, env, say))
}

async function fillWhereEmpty(state, step, fill) {
  if (state === 'empty') await step('Demo', fill)
  if (state === 'people')
    console.log('  There are people in the database already, so the demo is not filled in.')
  return state !== 'people'
}
