import { readFile, rm } from 'node:fs/promises'
import path from 'node:path'
import { build, isBuilt, nextProgram } from './build.mjs'
import { openCluster } from './cluster/open.mjs'
import { freePort } from './cluster/server.mjs'
import { assertNode, chromiumProgram, ensureProgram, installPackages, postgresProgram } from './machine.mjs'
import { isServed } from './run-record.mjs'
import { orderlyEnd } from './shut-down.mjs'
import { countPlaywright, countVitest } from './test-count.mjs'
import { explain, run, step, StepFailure } from './steps.mjs'

// `npm test`: everything that is checked, against a PostgreSQL server of its own, ending with one line of numbers.

const root = path.resolve(import.meta.dirname, '../..')
const results = path.join(root, 'test-results')
process.chdir(root)

const total = { passed: 0, failed: 0 }
const end = orderlyEnd()
await end.after(
  main().catch((error) => {
    if (end.isEnding()) return
    explain(error)
    total.failed += 1
  }),
)
if (!end.isEnding()) {
  process.exitCode = total.failed === 0 && total.passed > 0 ? 0 : 1
  console.log(`\n${total.passed} passed, ${total.failed} failed`)
}
await end.now(process.exitCode ?? 1)

async function main() {
  assertNode()
  await step('PostgreSQL', (say) => ensureProgram(postgresProgram, say))
  await step('Chromium', (say) => ensureProgram(chromiumProgram, say))
  await step('Packages', (say) => installPackages(root, say))
  let cluster
  await step('Database server of the tests', async (say) => {
    const dataFolder = path.join(root, '.data', 'test')
    // Where it had to lie outside of the project, nobody would ever remove it.
    end.with(async () => {
      if (cluster && !cluster.folder.startsWith(root))
        await rm(cluster.folder, { recursive: true, force: true })
    })
    cluster = await openCluster({ dataFolder, isForTests: true, takesOver: true, say, onStarting: end.with })
    return `on 127.0.0.1:${cluster.port}`
  })
  const env = { ...testEnv(), TEST_DATABASE_ADMIN_URL: cluster.url('admin', 'postgres') }

  // Each of these keeps about one core busy, so two rows of them share the two that there are.
  const style = async () => {
    await check('Format', env, 'prettier', ['--check', '.'])
    await check('Lint', env, 'eslint', ['.', '--max-warnings', '0'])
  }
  const types = async () => {
    await check('Types', env, 'tsc', ['--noEmit'], () =>
      // Types of the routes and next-env.d.ts, which is not committed.
      run(process.execPath, [nextProgram(root), 'typegen'], { cwd: root, env }),
    )
    await check('Generated types', env, 'tsx', ['lib/cli/types.ts', '--check'])
  }
  const [, isThere] = await Promise.all([
    style().then(() => vitest('unit', env)),
    types().then(() => builds(env)),
  ])
  await vitest('api', env)
  if (isThere) await playwright(env)
}

/** What the person who starts us has set for their own lab must not reach the tests. */
function testEnv() {
  const ours =
    /^(DATABASE_|STILLSTAND_|S3_|SMTP_|MAIL_|PG)|^(TEST_DATABASE_ADMIN_URL|HOST|PORT|PUBLIC_URL|LOG_LEVEL|NODE_ENV)$/
  const kept = Object.entries(process.env).filter(([name]) => !ours.test(name))
  return { ...Object.fromEntries(kept), NEXT_TELEMETRY_DISABLED: '1', CI: 'true', NO_COLOR: '1' }
}

function tool(name) {
  return path.join(root, 'node_modules', '.bin', name)
}

/** A check that passes or fails as a whole; a failed one counts as one failed. */
async function check(title, env, name, args, before = async () => undefined) {
  return counted(() =>
    step(title, async () => {
      await before()
      await run(tool(name), args, { cwd: root, env, what: [name, ...args].join(' ') })
      return 'well'
    }),
  )
}

async function counted(work) {
  try {
    await work()
    return true
  } catch (error) {
    if (end.isEnding()) throw error
    explain(error)
    total.failed += 1
    return false
  }
}

async function vitest(project, env) {
  const file = path.join(results, `vitest-${project}.json`)
  const args = [
    'run',
    '--project',
    project,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${file}`,
  ]
  await suite(`Tests (${project})`, env, 'vitest', args, file, countVitest)
}

async function playwright(env) {
  const ports = [await freePort(4310), await freePort(4311), await freePort(4312)]
  const file = path.join(results, 'playwright.json')
  const withPorts = { ...env, STILLSTAND_E2E_PORTS: ports.join(',') }
  await suite('Tests (browser)', withPorts, 'playwright', ['test'], file, countPlaywright)
}

/** Runs a suite of tests and adds what its report counts; a suite that tells nothing counts as one failed. */
async function suite(title, env, name, args, file, count) {
  await counted(() =>
    step(title, async (say) => {
      await rm(file, { force: true })
      const { code, lines } = await run(tool(name), args, { cwd: root, env, onLine: say, okCodes: [0, 1] })
      const report = await readFile(file, 'utf8').catch(() => null)
      const { passed, failed } = report ? count(JSON.parse(report)) : { passed: 0, failed: 0 }
      total.passed += passed
      if (failed === 0 && code === 0) return `${passed} passed`
      // The failure thrown below counts as one already.
      total.failed += Math.max(0, failed - 1)
      throw new StepFailure(
        `${name}: ${passed} passed, ${Math.max(1, failed)} failed.`,
        '',
        lines.slice(-400),
      )
    }),
  )
}

async function builds(env) {
  if (await isBuilt(root)) return true
  return counted(() =>
    step('Build', (say) => {
      if (isServed(path.join(root, '.data'))) {
        throw new StepFailure(
          'npm start serves the build that this one would replace, so the browser tests cannot run now.',
          'Stop it with Ctrl-C, then run npm test again.',
        )
      }
      return build(root, env, say)
    }),
  )
}
