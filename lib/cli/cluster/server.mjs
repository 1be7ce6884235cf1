import { spawn } from 'node:child_process'
import { existsSync, openSync, closeSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import net from 'node:net'
import path from 'node:path'
import { pause, run, StepFailure } from '../steps.mjs'

// One PostgreSQL server over one folder: made, started, found again after a killed run, stopped.

const programs = '/usr/lib/postgresql/15/bin'
// PG* variables of the person who starts us would steer psql and initdb elsewhere.
const cleanEnv = {
  ...Object.fromEntries(Object.entries(process.env).filter(([name]) => !name.startsWith('PG'))),
  LC_ALL: 'C.UTF-8',
}

/** Runs one of PostgreSQL's programs as the cluster's account. */
export function runPostgres(program, args, { account, env, ...options }) {
  const whole = { ...cleanEnv, ...env }
  return run(path.join(programs, program), args, { account, cwd: '/', env: whole, what: program, ...options })
}

/** Makes the cluster under a name of its own and gives it the real one when it is complete. */
export async function makeCluster({ folder, account, adminPassword, isForTests }) {
  const data = path.join(folder, 'data')
  if (existsSync(path.join(data, 'global', 'pg_control'))) return false
  if (existsSync(data)) {
    throw new StepFailure(
      `${data} is not a complete PostgreSQL cluster, and it was not this program that left it so.`,
      'Nothing was deleted. Move that folder away (or put the complete one back), then start again.',
    )
  }
  const halfMade = path.join(folder, 'data.half-made')
  const passwordFile = path.join(folder, 'password.txt')
  // Left by a start that was killed; no database ever ran in it.
  rmSync(halfMade, { recursive: true, force: true })
  rmSync(passwordFile, { force: true })
  await writeAs(account, passwordFile, `${adminPassword}\n`)
  await runPostgres('initdb', [...initdbArgs(isForTests), `--pwfile=${passwordFile}`, '-D', halfMade], {
    account,
    todo: 'See that the disk is not full and that the folder is writable, then start again.',
  })
  rmSync(passwordFile, { force: true })
  renameSync(halfMade, data)
  return true
}

const initdbArgs = (isForTests) => [
  '--username=stillstand_admin',
  '--encoding=UTF8',
  '--locale=C.UTF-8',
  // The tests' server holds nothing worth a password, and is gone when they end.
  ...(isForTests ? ['--auth=trust', '--no-sync'] : ['--auth=scram-sha-256', '--data-checksums']),
]

// initdb reads the password from a real file only, which its account must be able to read and nobody else.
async function writeAs({ uid, gid }, file, text) {
  writeFileSync(file, text, { mode: 0o600 })
  if (uid !== undefined) await run('chown', [`${uid}:${gid}`, file], { cwd: '/' })
}

/**
 * Finds the server that a killed run left over this folder, or null. A pid file alone proves nothing: its process may
 * be gone, or the number given to another.
 */
export async function findRunning({ folder, account }) {
  const data = path.join(folder, 'data')
  const pidFile = path.join(data, 'postmaster.pid')
  for (let round = 0; round < 60; round++) {
    if (!existsSync(pidFile)) return null
    const [pid, , , port, , , , status] = readFileSync(pidFile, 'utf8').split('\n')
    const inFolder = await processesIn(data, account)
    if (inFolder.includes(Number(pid))) {
      if (status?.trim() === 'ready') return { pid: Number(pid), port: Number(port) }
    } else if (inFolder.length === 0) {
      // Nobody works in the folder, so the file is stale; left there, a reused process number would stop the start.
      rmSync(pidFile, { force: true })
      return null
    }
    // Starting, stopping, or the children of a killed server that have not noticed yet.
    await pause(500)
  }
  throw new StepFailure(
    `A PostgreSQL server over ${data} is neither ready nor gone after 30 seconds.`,
    `See ${pidFile} for its process number; end that process with kill, then start again.`,
  )
}

// Asked as the cluster's account, since root without ptrace rights may not look at the processes of others.
async function processesIn(data, account) {
  const list =
    'for p in /proc/[0-9]*; do [ "$(readlink "$p/cwd" 2>/dev/null)" = "$1" ] && echo "${p#/proc/}"; done; true'
  const { stdout } = await run('/bin/sh', ['-c', list, 'sh', data], { account, cwd: '/' })
  return stdout.split('\n').filter(Boolean).map(Number)
}

/** Starts the server and waits until it answers. The process stays ours, so that its death is noticed. */
export async function startServer({ folder, account, port, logFile, settings = {} }) {
  const log = openSync(logFile, 'w')
  const all = { listen_addresses: '127.0.0.1', unix_socket_directories: '', port, ...settings }
  const args = Object.entries(all).flatMap(([name, value]) => ['-c', `${name}=${value}`])
  const child = spawn(path.join(programs, 'postgres'), ['-D', path.join(folder, 'data'), ...args], {
    ...account,
    cwd: '/',
    env: cleanEnv,
    // Ctrl-C in the terminal must not reach it: we stop it after those who use it.
    detached: true,
    stdio: ['ignore', log, log],
  })
  closeSync(log)
  let ended = false
  child.on('exit', () => (ended = true))
  child.on('error', () => (ended = true))
  // After a crash the server first replays its log, which may take a while.
  for (let round = 0; round < 600 && !ended; round++) {
    await pause(100)
    const { code } = await runPostgres('pg_isready', ['-q', '-h', '127.0.0.1', '-p', String(port)], {
      account,
      okCodes: [0, 1, 2],
    })
    if (code === 0 && !ended) return child
  }
  throw new StepFailure(
    ended ? 'PostgreSQL ended while starting.' : 'PostgreSQL does not answer after a minute.',
    `Its own words are above, and in ${logFile}. Nothing was deleted.`,
    readFileSync(logFile, 'utf8').trim().split('\n').slice(-15),
  )
}

export async function stopServer({ folder, account }) {
  const data = path.join(folder, 'data')
  if (!existsSync(path.join(data, 'postmaster.pid'))) return
  await runPostgres('pg_ctl', ['stop', '-D', data, '-m', 'fast', '-w', '-t', '60'], {
    account,
    okCodes: [0, 1],
  })
}

/** The remembered port if it is free, otherwise a free one. */
export async function freePort(wanted, host = '127.0.0.1') {
  if (wanted && (await isFree(wanted, host))) return wanted
  return new Promise((resolve, reject) => {
    const server = net.createServer()
    server.on('error', reject)
    server.listen(0, host, () => {
      const { port } = server.address()
      server.close(() => resolve(port))
    })
  })
}

export function isFree(port, host) {
  return new Promise((resolve) => {
    const server = net.createServer()
    server.on('error', () => resolve(false))
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)))
  })
}
