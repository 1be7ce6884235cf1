import { createHash, randomBytes } from 'node:crypto'
import { chmodSync, existsSync, mkdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { isRoot } from '../machine.mjs'
import { run, StepFailure } from '../steps.mjs'

// Where a cluster's data lie, which account runs it, and what is remembered about it between starts.

/** Makes the folder that holds everything local. Others may pass through it (the postgres account), not list it. */
export function makeDataFolder(folder) {
  mkdirSync(folder, { recursive: true })
  if (statSync(folder).uid === (process.getuid?.() ?? 0)) chmodSync(folder, 0o711)
}

/**
 * The folder of the cluster and the account that runs it. PostgreSQL refuses to run as root, who therefore runs it as
 * the owner of the data, or as Debian's postgres account; where that account cannot reach the project, the data lie
 * under /var/lib/postgresql.
 */
export async function findPlace(dataFolder) {
  const remembered = readRemembered(dataFolder)
  const inProject = path.join(dataFolder, 'postgres')
  const folder = remembered.folder ?? inProject
  if (!isRoot) {
    if (existsSync(folder)) assertOwn(folder)
    else mkdirSync(folder, { recursive: true, mode: 0o700 })
    return { folder, account: {} }
  }
  if (existsSync(folder)) {
    const { uid, gid } = statSync(folder)
    return { folder, account: uid === 0 ? await makeFor(await postgresAccount(), folder) : { uid, gid } }
  }
  const account = await postgresAccount()
  if (await canReach(account, dataFolder)) return { folder, account: await makeFor(account, folder) }
  const elsewhere = path.join('/var/lib/postgresql', nameOf(dataFolder))
  await makeFor(account, elsewhere)
  remember(dataFolder, { folder: elsewhere })
  return { folder: elsewhere, account }
}

function assertOwn(folder) {
  if (statSync(folder).uid === process.getuid?.()) return
  throw new StepFailure(
    `The database in ${folder} belongs to another account, because an earlier start was made by root or another user.`,
    'Start as that user again, or clone the project anew for this one.',
  )
}

async function postgresAccount() {
  const line = readFileSync('/etc/passwd', 'utf8').match(/^postgres:[^:]*:(\d+):(\d+):/m)
  if (!line) {
    throw new StepFailure(
      'There is no account named postgres, which PostgreSQL runs as when root starts it.',
      "Reinstall Debian's postgresql-common, or start as an ordinary user.",
    )
  }
  return { uid: Number(line[1]), gid: Number(line[2]) }
}

async function makeFor(account, folder) {
  mkdirSync(folder, { recursive: true })
  await run('chown', [`${account.uid}:${account.gid}`, folder], { cwd: '/' })
  chmodSync(folder, 0o700)
  return account
}

async function canReach(account, folder) {
  const { code } = await run('/usr/bin/test', ['-x', folder], { account, cwd: '/', okCodes: [0, 1] })
  return code === 0
}

/** stillstand-my-clone-1a2b3c4d: readable, and different for each path. */
export function nameOf(folder) {
  const words = path
    .dirname(folder)
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
  return `stillstand${words.slice(-40)}-${createHash('sha256').update(folder).digest('hex').slice(0, 8)}`
}

const rememberedFile = (dataFolder) => path.join(dataFolder, 'cluster.json')

/** @returns {{ folder?: string, port?: number }} */
export function readRemembered(dataFolder) {
  return readJson(rememberedFile(dataFolder)) ?? {}
}

export function remember(dataFolder, facts) {
  writeWhole(rememberedFile(dataFolder), { ...readRemembered(dataFolder), ...facts }, 0o644)
}

/** The passwords of the roles, made once. `isNew` says that they were not there, whatever the cluster holds. */
export function readSecrets(dataFolder) {
  const file = path.join(dataFolder, 'secrets.json')
  const present = readJson(file) ?? {}
  const names = ['admin', 'owner', 'app', 'seed']
  const isNew = names.some((name) => !present[name])
  const secrets = Object.fromEntries(
    names.map((name) => [name, present[name] ?? randomBytes(24).toString('hex')]),
  )
  if (isNew) writeWhole(file, secrets, 0o600)
  return { secrets, isNew }
}

function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch (error) {
    if (error.code === 'ENOENT' || error instanceof SyntaxError) return null
    if (error.code !== 'EACCES') throw error
    throw new StepFailure(
      `${file} cannot be read by this user, because an earlier start was made by root or another user.`,
      'Start as that user again, or clone the project anew for this one.',
    )
  }
}

// Under another name first, so that a kill in between leaves the old content.
function writeWhole(file, content, mode) {
  writeFileSync(`${file}.new`, `${JSON.stringify(content, null, 2)}\n`, { mode })
  renameSync(`${file}.new`, file)
}
