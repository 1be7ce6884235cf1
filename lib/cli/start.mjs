import { existsSync } from 'node:fs'
import path from 'node:path'
import { build, isBuilt } from './build.mjs'
import { openCluster } from './cluster/open.mjs'
import { makeDataFolder } from './cluster/place.mjs'
import { isFree } from './cluster/server.mjs'
import { databaseUrls, prepareGivenDatabase, prepareOwnDatabase } from './databases.mjs'
import { assertNode, ensureProgram, installPackages, postgresProgram } from './machine.mjs'
import { claimFolder } from './run-record.mjs'
import { keepWorker, startWebServer, waitForAnswer } from './serve.mjs'
import { orderlyEnd } from './shut-down.mjs'
import { recordLongRuns, run, script, step, StepFailure } from './steps.mjs'

// `npm start`: from a fresh clone to a running lab, and in seconds from the second time on.

const root = path.resolve(import.meta.dirname, '../..')
const dataFolder = path.join(root, '.data')
process.chdir(root)
if (existsSync('.env')) process.loadEnvFile('.env')

const end = orderlyEnd()
await end.after(main())

async function main() {
  assertNode()
  makeDataFolder(dataFolder)
  const record = await claimFolder(dataFolder, console.log)
  end.with(record.release)
  recordLongRuns(record.add)

  // First, since it may need a command by root: nobody should wait for the packages to be told so.
  if (!process.env['DATABASE_URL']) await step('PostgreSQL', (say) => ensureProgram(postgresProgram, say))
  await step('Packages', (say) => installPackages(root, say))
  await step('Environment', checkEnvironment)
  const host = process.env['HOST'] || '127.0.0.1'
  const port = await choosePort(host)
  const publicUrl = process.env['PUBLIC_URL'] || `http://127.0.0.1:${port}`
  const { env, hasDemo } = await prepareDatabase({ HOST: host, PORT: String(port), PUBLIC_URL: publicUrl })
  if (!(await isBuilt(root))) await step('Build', (say) => build(root, env, say))
  await serve({ env, hasDemo, host, port, record })
}

async function checkEnvironment() {
  await run(process.execPath, script('lib/cli/environment.ts'), {
    cwd: root,
    env: process.env,
    what: 'Checking the environment',
    todo: 'Correct the variables named above, or leave them out. README.md has the table of all of them.',
  })
  return 'checked'
}

async function choosePort(host) {
  const given = Number(process.env['PORT']) || null
  for (const port of given ? [given] : Array.from({ length: 20 }, (_, index) => 3000 + index)) {
    if (!(await isFree(port, host))) continue
    if (!given && port !== 3000)
      console.log(`Port 3000 is taken by another program; this start uses ${port}.`)
    return port
  }
  throw new StepFailure(
    given
      ? `Port ${given} is taken by another program.`
      : 'Ports 3000 to 3019 are all taken by other programs.',
    `End that program, or choose another port: PORT=${(given ?? 3019) + 1} npm start`,
  )
}

/** Sees to a database; returns the environment that the programs of the application get, and whether it has the demo. */
async function prepareDatabase(extra) {
  const isGiven = Boolean(process.env['DATABASE_URL'])
  const wantsDemo = isGiven
    ? process.env['STILLSTAND_DEMO'] === 'on'
    : process.env['STILLSTAND_DEMO'] !== 'off'
  const env = { ...process.env, ...extra, STILLSTAND_DEMO: wantsDemo ? 'on' : 'off' }
  if (isGiven) {
    return { env, hasDemo: await prepareGivenDatabase({ root, env, wantsDemo, step }) }
  }
  let cluster
  await step('Database server', async (say) => {
    cluster = await openOwnCluster(say)
    return `on 127.0.0.1:${cluster.port}, data in ${cluster.folder}`
  })
  const hasDemo = await prepareOwnDatabase({ cluster, root, env, wantsDemo, step })
  return { env: { ...env, ...databaseUrls(cluster) }, hasDemo }
}

async function openOwnCluster(say) {
  const options = { dataFolder, takesOver: true, onDeath: () => void startAgain() }
  const cluster = await openCluster({ ...options, say, onStarting: end.with })
  return cluster

  async function startAgain() {
    if (end.isEnding()) return
    console.error('The database server ended unasked. It is started again; what was saved is kept.')
    try {
      const again = await openCluster(options)
      if (again.port !== cluster.port) throw new StepFailure(`Its port ${cluster.port} was taken meanwhile.`)
      console.error('The database server is back.')
    } catch (error) {
      await end.now(1, error)
    }
  }
}

async function serve({ env, hasDemo, host, port, record }) {
  // Held back until the address stands on the screen, so that nothing runs into the steps' lines.
  const held = []
  let print = (line) => held.push(line)
  const onLine = (name, line) => print(`${name.padEnd(6)} | ${line}`)
  const serving = step('Server', async () => {
    const server = startWebServer({ root, env, host, port, onLine })
    end.with(server.stop)
    record.add('web server', server.pid)
    const onStart = (worker) => record.add('job worker', worker.pid)
    end.with(keepWorker({ root, env, onLine, onStart, onGivingUp: (error) => void end.now(1, error) }).stop)
    await waitForAnswer(server, { host, port, isStopping: end.isEnding })
    void server.ended.then((how) => {
      if (!end.isEnding())
        void end.now(1, new StepFailure(`The web server ended unasked (${how}).`, 'Start again.'))
    })
    return `answers on ${host}:${port}, the job worker beside it`
  })
  const [lines] = await Promise.all([printWelcome(env, hasDemo), serving])
  record.serves(env['PUBLIC_URL'])
  print = console.log
  for (const line of held) print(line)
  console.log(`\nStillstand is at ${env['PUBLIC_URL']}\n`)
  for (const line of lines) console.log(`  ${line}`)
  console.log('\nCtrl-C stops everything; the data stay.\n')
}

/** The demo people, or the one-time code with which the first manager of an empty lab is made. */
async function printWelcome(env, hasDemo) {
  const print = hasDemo ? script('lib/cli/seed.ts', '--people') : script('lib/cli/first-code.ts')
  const { stdout } = await run(process.execPath, print, { cwd: root, env, what: 'Asking who may sign in' })
  return stdout.trimEnd().split('\n')
}
