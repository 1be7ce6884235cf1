import { existsSync } from 'node:fs'
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises'
import path from 'node:path'
import { run, StepFailure } from './steps.mjs'

// What the machine must have before anything of ours can run: Node, the packages, programs of Debian.

export const isRoot = process.getuid?.() === 0

export function assertNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  if (major === 20 && minor >= 19) return
  throw new StepFailure(
    `Stillstand runs on Node 20 (20.19 or later); this is Node ${process.versions.node}.`,
    'Install Node 20 and start again.',
  )
}

/** Installs from the lock file, unless what is installed is what it names. */
export async function installPackages(root, say) {
  if (await packagesAreCurrent(root)) return 'as the lock file says'
  say('installing from the lock file')
  // npm says where it stands itself, when it started this script.
  const npm = process.env['npm_execpath']
  const [command, first] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []]
  await run(command, [...first, 'ci', '--include=dev', '--no-audit', '--no-fund', '--no-progress'], {
    cwd: root,
    env: { ...process.env, NODE_ENV: '' },
    what: 'npm ci',
    isLong: true,
    todo: 'Read the lines above. Mostly the package registry cannot be reached: see that `npm ping` works, then start again.',
  })
  if (!(await packagesAreCurrent(root))) {
    throw new StepFailure(
      'npm ci ended well, yet node_modules does not hold what package-lock.json names.',
      'Remove the folder node_modules and start again.',
    )
  }
  return 'installed from the lock file'
}

/** npm writes node_modules/.package-lock.json last, so a killed install does not look like a complete one. */
export async function packagesAreCurrent(root) {
  const wanted = await readJson(path.join(root, 'package-lock.json'))
  const present = await readJson(path.join(root, 'node_modules', '.package-lock.json'))
  if (!wanted) throw new StepFailure(`There is no package-lock.json in ${root}.`, 'Clone the project anew.')
  if (!present) return false
  return Object.entries(wanted.packages).every(([place, { version, integrity, optional }]) => {
    if (place === '') return true
    const found = present.packages[place]
    // Those of other platforms are optional, and rightly missing.
    if (!found) return Boolean(optional)
    return found.version === version && found.integrity === integrity
  })
}

async function readJson(file) {
  try {
    return JSON.parse(await readFile(file, 'utf8'))
  } catch (error) {
    if (error.code === 'ENOENT' || error instanceof SyntaxError) return null
    throw error
  }
}

// Debian's package would start a cluster of its own on 5432; nobody asked for that one.
const noMainCluster = '/etc/postgresql-common/createcluster.d/stillstand.conf'
const holdMainCluster = 'create_main_cluster = false\n'

/** Sees that a program of Debian is there; as root installs it, otherwise stops with the one command to run. */
export async function ensureProgram({ program, debianPackage, why }, say) {
  if (existsSync(program)) return `${debianPackage} is there`
  if (!existsSync('/usr/bin/apt-get')) {
    throw new StepFailure(
      `${program} is missing, and this machine has no apt-get to install it with.`,
      `Stillstand is made for Debian 12. Install ${debianPackage} (${why}) so that ${program} exists, then start again.`,
    )
  }
  if (!isRoot) {
    throw new StepFailure(
      `${debianPackage} is not installed (${why}), and only root may install it. Run this one command, then start again:`,
      `\n    ${installCommand(debianPackage)}\n`,
    )
  }
  const todo = 'See that this machine reaches its Debian mirror (`apt-get update`), then start again.'
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const apt = (...args) => run('apt-get', ['-o', 'DPkg::Lock::Timeout=120', ...args], { env, todo })
  const held = debianPackage.startsWith('postgresql') && !existsSync(noMainCluster)
  if (held) {
    await mkdir(path.dirname(noMainCluster), { recursive: true })
    await writeFile(noMainCluster, holdMainCluster)
  }
  try {
    say('asking Debian for its list of packages')
    await apt('update', '-q')
    say(`installing Debian's ${debianPackage}`)
    await apt('install', '-q', '-y', '--no-install-recommends', debianPackage)
  } finally {
    if (held) await rm(noMainCluster, { force: true })
  }
  if (!existsSync(program)) {
    throw new StepFailure(`${debianPackage} is installed, yet ${program} is missing.`, todo)
  }
  return `installed Debian's ${debianPackage}`
}

function installCommand(debianPackage) {
  const steps = [`apt-get update`, `apt-get install -y --no-install-recommends ${debianPackage}`]
  if (debianPackage.startsWith('postgresql')) {
    steps.unshift(`install -D /dev/stdin ${noMainCluster}`)
    steps[0] = `echo "${holdMainCluster.trim()}" | ${steps[0]}`
  }
  const become = existsSync('/usr/bin/sudo') ? 'sudo sh -c' : 'su -c'
  return `${become} '${steps.join(' && ')}'`
}

export const postgresProgram = {
  program: '/usr/lib/postgresql/15/bin/postgres',
  debianPackage: 'postgresql-15',
  why: 'the database server',
}
export const chromiumProgram = {
  program: '/usr/bin/chromium',
  debianPackage: 'chromium',
  why: 'the browser of the tests',
}
