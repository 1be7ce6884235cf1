import { readFileSync } from 'node:fs'
import { explain, interrupt, resume } from './steps.mjs'

/**
 * Ends a program of ours in order, whatever ends it: a signal, a failure, or the npm that started it going away.
 * What was started is stopped last first, and only then does the process end.
 */
export function orderlyEnd() {
  const stops = []
  let ending = null
  let work = Promise.resolve()

  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    // Ctrl-C reaches us twice, from the terminal and from npm; the second changes nothing.
    process.on(signal, () => {
      if (!ending) console.log('\nStopping …')
      void now(0)
    })
  }
  process.on('uncaughtException', (error) => void now(1, error))
  // The terminal may be gone before we are.
  process.stdout.on('error', () => undefined)
  process.stderr.on('error', () => undefined)
  watchParent(() => void now(1))

  return {
    /** Adds what to stop at the end. */
    with: (stop) => stops.push(stop),
    isEnding: () => ending !== null,
    now,
    /** Runs the program itself; its failure is told and ends everything. */
    after: async (program) => {
      work = program
      try {
        await program
      } catch (error) {
        await now(1, error)
      }
    },
  }

  function now(code, error) {
    if (error && !ending) explain(error)
    ending ??= stopAll(code)
    return ending
  }

  async function stopAll(code) {
    interrupt()
    // Let the step that runs notice, so that it starts nothing more behind our back.
    await work.catch(() => undefined)
    resume()
    for (const stop of stops.reverse()) {
      try {
        await stop()
      } catch (error) {
        explain(error)
        code = 1
      }
    }
    process.exit(code)
  }
}

// A killed npm sends no signal, but leaves us, or the shell between it and us, to another parent.
function watchParent(onGone) {
  if (!process.env['npm_lifecycle_event']) return
  const watched = [process.pid]
  if (/^(sh|dash|bash)$/.test(statOf(process.ppid).name)) watched.push(process.ppid)
  const parents = () => watched.map((pid) => statOf(pid).parent).join()
  const before = parents()
  const watching = setInterval(() => {
    if (parents() === before) return
    clearInterval(watching)
    onGone()
  }, 500)
  watching.unref()
}

function statOf(pid) {
  try {
    const [, name = '', parent = ''] =
      readFileSync(`/proc/${pid}/stat`, 'utf8').match(/\((.*)\) \S (\d+)/) ?? []
    return { name, parent }
  } catch {
    return { name: '', parent: '' }
  }
}
