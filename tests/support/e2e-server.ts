import { existsSync } from 'node:fs'
import { cp, rm } from 'node:fs/promises'
import { keepWorker, startWebServer, waitForAnswer } from '@/lib/cli/serve.mjs'
import { seed } from '@/lib/cli/databases.mjs'
import { orderlyEnd } from '@/lib/cli/shut-down.mjs'
import { demoLab, emptyLab, lookedLab, projectRoot as root, type Lab } from './e2e-labs'
import { ensureTemplate, withAdmin } from './template'

// Run by playwright.config.ts, once per lab: a fresh database, then the built application over it, until told to stop.

const labs: Record<string, Lab> = { demo: demoLab, looked: lookedLab, empty: emptyLab }
const lab = labs[process.argv[2] ?? '']
if (!lab) throw new Error('Name the lab to serve: demo, looked or empty.')

const end = orderlyEnd()
await end.after(serve(lab))

async function serve(lab: Lab): Promise<void> {
  const { name, database, port, env: labEnv } = lab
  const env = { ...process.env, ...labEnv }
  const say = (line: string) => console.log(`${name}: ${line}`)
  if (name !== 'looked') {
    await create(lab, await ensureTemplate())
    await rm(filesOf(lab), { recursive: true, force: true })
  }
  if (name === 'demo') {
    say(await seed(root, env, say))
    // While nobody is connected to it; Playwright starts one server after the other, this one first.
    await create(lookedLab, database)
    await rm(filesOf(lookedLab), { recursive: true, force: true })
    if (existsSync(filesOf(lab))) await cp(filesOf(lab), filesOf(lookedLab), { recursive: true })
  }

  const onLine = (process: string, line: string) => say(`${process} | ${line}`)
  const server = startWebServer({ root, env, host: '127.0.0.1', port, onLine })
  end.with(server.stop)
  const onGivingUp = (error: Error) => void end.now(1, error)
  end.with(keepWorker({ root, env, onLine, onStart: () => undefined, onGivingUp }).stop)
  await waitForAnswer(server, { host: '127.0.0.1', port, isStopping: end.isEnding })
  void server.ended.then((how) => {
    if (!end.isEnding()) void end.now(1, new Error(`The web server of the ${name} lab ended (${how}).`))
  })
}

function filesOf({ env }: Lab): string {
  return env['STILLSTAND_FILES']!
}

async function create({ database }: Lab, template: string): Promise<void> {
  await withAdmin(async (admin) => {
    await admin.query(`drop database if exists ${database} with (force)`)
    await admin.query(`create database ${database} template ${template} owner stillstand_owner`)
  })
}
