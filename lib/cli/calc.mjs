import { createHash } from 'node:crypto'
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import path from 'node:path'
import { compileFunction } from 'node:vm'

// Starts calc.ts without a build and without a second process: the sources and the packages they use are bundled into
// one script, kept under node_modules/.cache by what the sources say. `npm ci` prepares it (--prepare); after a change
// the next calc does, and where that folder cannot be written every calc does.

const root = path.resolve(import.meta.dirname, '../..')
const entry = path.join(root, 'lib/cli/calc.ts')
const cache = path.join(root, 'node_modules/.cache/calc')

const file = path.join(cache, `${fingerprint()}.cjs`)
const script = kept() ?? (await bundle())
if (!process.argv.includes('--prepare')) {
  compileFunction(script, ['require'], { filename: file })(createRequire(import.meta.url))
}

/** Of everything that the script is made from: the sources here, and the packages by their lock file. */
function fingerprint() {
  const hash = createHash('sha256')
  const science = path.join(root, 'lib/science')
  const sources = readdirSync(science, { recursive: true })
    .filter((name) => /\.[cm]?[jt]s$/.test(name))
    .sort()
    .map((name) => path.join(science, name))
  for (const source of [import.meta.filename, entry, ...sources, path.join(root, 'package-lock.json')]) {
    hash.update(`${source}\n`).update(readFileSync(source))
  }
  return hash.digest('hex').slice(0, 32)
}

function kept() {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return null
  }
}

async function bundle() {
  const { build } = await import('esbuild')
  const { outputFiles } = await build({
    entryPoints: [entry],
    absWorkingDir: root,
    bundle: true,
    write: false,
    platform: 'node',
    target: 'node20',
    format: 'cjs',
    logLevel: 'error',
  })
  const made = outputFiles[0].text
  keep(made)
  return made
}

/** Written aside and renamed, so that another calc at the same moment reads all of it or nothing. */
function keep(made) {
  const aside = `${file}.${process.pid}`
  try {
    mkdirSync(cache, { recursive: true })
    writeFileSync(aside, made)
    renameSync(aside, file)
    for (const name of readdirSync(cache)) {
      if (name !== path.basename(file)) rmSync(path.join(cache, name), { force: true })
    }
  } catch {
    // A read-only installation: the next run bundles again.
  }
}
