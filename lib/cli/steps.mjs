import { spawn } from 'node:child_process'

// Node's own modules only: this runs before anything is installed.

/** A failure that says what failed and what to do; anything else that is thrown is a defect of ours. */
export class StepFailure extends Error {
  /** @param {string} what @param {string} [todo] @param {string[]} [output] */
  constructor(what, todo = '', output = []) {
    super(what)
    this.todo = todo
    this.output = output
  }
}

const isTerminal = process.stdout.isTTY && !process.env['CI']
const secondsSince = (started) => `${((performance.now() - started) / 1000).toFixed(1)} s`

/**
 * Shows one step while it works and how long it took. `work` gets `say`, to tell how far it is, and returns what
 * came of it in a few words.
 */
export async function step(title, work) {
  const started = performance.now()
  let note = 'working'
  let shown = 0
  const line = () => `… ${title}: ${note} (${secondsSince(started)})`
  const show = () => {
    if (isTerminal) process.stdout.write(`\r\x1b[2K${line().slice(0, (process.stdout.columns ?? 80) - 1)}`)
    else if (performance.now() - started > shown + 10_000) {
      shown = performance.now() - started
      console.log(line())
    }
  }
  if (!isTerminal) console.log(`… ${title}`)
  const ticking = setInterval(show, isTerminal ? 200 : 1_000)
  try {
    const outcome = await work((text) => {
      note = text
      show()
    })
    finish(`+ ${title}: ${outcome} (${secondsSince(started)})`)
  } catch (error) {
    finish(isInterrupted ? `- ${title}: stopped` : `x ${title}: failed after ${secondsSince(started)}`)
    throw error
  } finally {
    clearInterval(ticking)
  }

  function finish(text) {
    clearInterval(ticking)
    if (isTerminal) process.stdout.write('\r\x1b[2K')
    console.log(text)
  }
}

/** Prints a failure for a person: what failed, the last lines of the program that failed, what to do. */
export function explain(error) {
  if (!(error instanceof StepFailure)) {
    console.error(error)
    return
  }
  for (const text of error.output) console.error(`    ${text}`)
  console.error(`\n${error.message}`)
  if (error.todo) console.error(error.todo)
}

/** Commands that run at the moment, so that a signal can end them, and whoever records them for the next start. */
const running = new Set()
let isInterrupted = false
let onLongRun = () => undefined

/**
 * Runs a command to its end and returns what it printed.
 * `account` is { uid, gid } to run as; `onLine` sees each line as it comes; `todo` is what to do when it fails;
 * `isLong` has it recorded, so that the next start can end it should this process be killed.
 */
export function run(command, args, options = {}) {
  const { cwd, env, account = {}, input, onLine, todo, what, okCodes = [0], isLong = false } = options
  return new Promise((resolve, reject) => {
    const name = what ?? [command, ...args].join(' ')
    if (isInterrupted) throw new StepFailure(`${name} was not started, because everything is being stopped.`)
    // A group of its own, so that ending it also ends what it started.
    const child = spawn(command, args, { cwd, env, ...account, detached: true, stdio: 'pipe' })
    running.add(child)
    if (isLong && child.pid) onLongRun(name, child.pid)
    const lines = []
    let standardOutput = ''
    child.stdout.on('data', (data) => (standardOutput += data))
    for (const stream of [child.stdout, child.stderr]) {
      eachLine(stream, (line) => {
        lines.push(line)
        onLine?.(line)
      })
    }
    // A command that ends without reading its input is not a failure by itself.
    child.stdin.on('error', () => undefined)
    child.stdin.end(input ?? '')
    child.on('error', (error) => {
      running.delete(child)
      reject(new StepFailure(`${name} could not be started: ${error.message}`, todo))
    })
    child.on('close', (code, signal) => {
      running.delete(child)
      if (okCodes.includes(code)) resolve({ code, stdout: standardOutput, lines })
      else reject(new StepFailure(`${name} ended with ${signal ?? code}.`, todo, lines.slice(-30)))
    })
  })
}

/** Ends the commands that run and lets none start, until `resume`. */
export function interrupt() {
  isInterrupted = true
  for (const child of running) if (child.pid) endGroup(child.pid, 'SIGTERM')
}

export function resume() {
  isInterrupted = false
}

export function recordLongRuns(record) {
  onLongRun = record
}

/** Signals a process and all of its group; one that is gone already is no failure. */
export function endGroup(pid, signal) {
  try {
    process.kill(-pid, signal)
  } catch (error) {
    if (error.code !== 'ESRCH') throw error
  }
}

export function eachLine(stream, onLine) {
  let rest = ''
  stream.setEncoding('utf8')
  stream.on('data', (data) => {
    const parts = (rest + data).split('\n')
    rest = parts.pop() ?? ''
    for (const part of parts) if (part.trim()) onLine(part.trimEnd())
  })
  stream.on('end', () => {
    if (rest.trim()) onLine(rest.trimEnd())
  })
}

export const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds))

/** The arguments with which Node runs a TypeScript script of ours in one process, that signals reach. */
export function script(file, ...args) {
  return ['--import', 'tsx', file, ...args]
}
