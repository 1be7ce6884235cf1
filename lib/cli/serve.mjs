import { spawn } from 'node:child_process'
import { nextProgram } from './build.mjs'
import { eachLine, endGroup, pause, script, StepFailure } from './steps.mjs'

// The two processes that make the running application: the web server and the job worker.

/** The environment of both; NODE_ENV decides what the framework does. */
const servingEnv = (env) => ({ ...env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' })

export function startWebServer({ root, env, host, port, onLine }) {
  const args = [nextProgram(root), 'start', '-H', host, '-p', String(port)]
  return startProcess('server', args, { root, env: servingEnv(env), onLine })
}

export function startWorker({ root, env, onLine }) {
  return startProcess('worker', script('lib/cli/worker.ts'), { root, env: servingEnv(env), onLine })
}

/** The job worker, started again when it ends unasked, since the lab can log readings without it; five times a minute. */
export function keepWorker({ root, env, onLine, onStart, onGivingUp }) {
  const deaths = []
  let isStopped = false
  let worker = start()
  return {
    stop: async () => {
      isStopped = true
      await worker.stop()
    },
  }

  function start() {
    const started = startWorker({ root, env, onLine })
    onStart(started)
    void started.ended.then(async (how) => {
      if (isStopped) return
      deaths.push(Date.now())
      if (deaths.filter((at) => at > Date.now() - 60_000).length > 5) {
        onGivingUp(new StepFailure('The job worker ends again and again.', 'Its own last words are above.'))
        return
      }
      onLine(
        'worker',
        `ended unasked (${how}); mail and scheduled work wait; it is started again in 2 seconds`,
      )
      await pause(2_000)
      if (!isStopped) worker = start()
    })
    return started
  }
}

/** Waits until the web server answers without an error of its own. */
export async function waitForAnswer(server, { host, port, isStopping = () => false }) {
  const reached = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host
  const address = `http://${reached.includes(':') ? `[${reached}]` : reached}:${port}/sign-in`
  let last = 'no answer'
  for (let round = 0; round < 600 && !server.hasEnded() && !isStopping(); round++) {
    const status = await fetch(address, { redirect: 'manual', signal: AbortSignal.timeout(10_000) })
      .then((response) => response.status)
      .catch(() => null)
    if (status !== null && status < 500) return
    if (status !== null) last = `status ${status}`
    // An answer with an error of the server will hardly become another one.
    if (status !== null && round > 20) break
    await pause(100)
  }
  throw new StepFailure(
    server.hasEnded() ? 'The server ended while starting.' : `The server does not serve ${address}: ${last}.`,
    'Its own last words are above.',
    server.lastLines(),
  )
}

/**
 * Starts a Node process in a group of its own, which Ctrl-C in the terminal does not reach: it is ended in order.
 */
function startProcess(name, args, { root, env, onLine }) {
  const child = spawn(process.execPath, args, {
    cwd: root,
    env,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  const lines = []
  let ending = null
  for (const stream of [child.stdout, child.stderr]) {
    eachLine(stream, (line) => {
      lines.push(line)
      if (lines.length > 40) lines.shift()
      onLine?.(name, line)
    })
  }
  const ended = new Promise((resolve) => {
    child.on('error', (error) => resolve((ending = error.message)))
    child.on('exit', (code, signal) => resolve((ending = signal ? `signal ${signal}` : `code ${code}`)))
  })
  return {
    name,
    pid: child.pid,
    /** Resolves with how it ended. */
    ended,
    hasEnded: () => ending !== null,
    lastLines: () => lines.slice(-30),
    stop: async () => {
      if (ending !== null || !child.pid) return
      endGroup(child.pid, 'SIGTERM')
      await Promise.race([ended, pause(10_000)])
      if (ending === null) endGroup(child.pid, 'SIGKILL')
      await ended
    },
  }
}
