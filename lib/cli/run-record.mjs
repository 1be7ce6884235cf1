import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { endGroup, pause, StepFailure } from './steps.mjs'

// What runs for this folder, written down so that the next start finds what a killed one left.

/** A process by number and start time, since numbers are given again. */
function identify(pid) {
  return { pid, born: birthOf(pid) }
}

function birthOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    const [state, ...rest] = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
    // The 22nd field; a zombie has ended, only nobody has asked for its exit code.
    return state === 'Z' ? null : rest[18]
  } catch {
    return null
  }
}

const isAlive = ({ pid, born }) => born !== null && birthOf(pid) === born

/**
 * Claims the folder for this process: refuses while another start serves it, ends what a killed start left.
 * Returns the record to add children to.
 */
export async function claimFolder(dataFolder, say = () => undefined) {
  const file = path.join(dataFolder, 'run.json')
  const earlier = read(file)
  if (earlier) {
    await refuseWhileAlive(earlier, say)
    for (const child of earlier.children) await endLeftOver(child, say)
  }
  const record = { ...identify(process.pid), address: '', children: [] }
  const write = () => {
    writeFileSync(`${file}.new`, JSON.stringify(record, null, 2))
    renameSync(`${file}.new`, file)
  }
  write()
  return {
    add: (name, pid) => {
      record.children = [...record.children.filter(isAlive), { name, ...identify(pid) }]
      write()
    },
    serves: (address) => {
      record.address = address
      write()
    },
    release: () => rmSync(file, { force: true }),
  }
}

/** Whether a start serves this folder at the moment. */
export function isServed(dataFolder) {
  const record = read(path.join(dataFolder, 'run.json'))
  return record !== null && isAlive(record)
}

function read(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch (error) {
    if (error.code === 'ENOENT' || error instanceof SyntaxError) return null
    throw error
  }
}

async function refuseWhileAlive(record, say) {
  // It may be stopping just now.
  for (let round = 0; round < 30 && isAlive(record); round++) {
    say(`waiting for process ${record.pid}, which may be stopping`)
    await pause(100)
  }
  if (!isAlive(record)) return
  const where = record.address ? ` at ${record.address}` : ''
  throw new StepFailure(
    `Stillstand runs from this folder already${where} (process ${record.pid}).`,
    `Use that one, or stop it with Ctrl-C where it runs, or with: kill ${record.pid}`,
  )
}

async function endLeftOver(child, say) {
  if (!isAlive(child)) return
  say(`ending what a killed run left: ${child.name} (process ${child.pid})`)
  endGroup(child.pid, 'SIGTERM')
  for (let round = 0; round < 50 && isAlive(child); round++) await pause(100)
  if (isAlive(child)) endGroup(child.pid, 'SIGKILL')
}
