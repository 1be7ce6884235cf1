import { createHash } from 'node:crypto'
import { existsSync } from 'node:fs'
import { readdir, readFile, rm, writeFile } from 'node:fs/promises'
import path from 'node:path'
import { run } from './steps.mjs'

// Builds the application when its sources are not those of the build that is there.

const folders = ['app', 'components', 'lib', 'public']
// Not tsconfig.json, which the build itself may complete.
const files = [
  ...['next.config.mjs', 'postcss.config.mjs', 'tailwind.config.ts', 'package-lock.json'],
  ...['proxy.ts', 'instrumentation.ts', 'instrumentation-client.ts'],
]

export const nextProgram = (root) => path.join(root, 'node_modules/next/dist/bin/next')

/** One hash over all that the build is made of. */
export async function hashSources(root) {
  const hash = createHash('sha256').update(process.versions.node)
  const inFolders = await Promise.all(folders.map((folder) => listFiles(root, folder)))
  for (const file of [...files, ...inFolders.flat()].sort()) {
    const content = await readFile(path.join(root, file)).catch(() => null)
    if (content) hash.update(`\n${file}\n`).update(createHash('sha256').update(content).digest())
  }
  return hash.digest('hex')
}

async function listFiles(root, folder) {
  const entries = await readdir(path.join(root, folder), { withFileTypes: true, recursive: true }).catch(
    () => [],
  )
  return entries
    .filter((entry) => entry.isFile())
    .map((entry) => path.relative(root, path.join(entry.parentPath, entry.name)))
}

const markFile = (root) => path.join(root, '.next', 'built-from')

export async function isBuilt(root) {
  const mark = await readFile(markFile(root), 'utf8').catch(() => '')
  return existsSync(path.join(root, '.next', 'BUILD_ID')) && mark === (await hashSources(root))
}

export async function build(root, env, say) {
  const sources = await hashSources(root)
  // A build that is killed must not pass for the one before.
  await rm(markFile(root), { force: true })
  say('building, which takes about a minute')
  await run(process.execPath, [nextProgram(root), 'build'], {
    cwd: root,
    env: { ...env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
    onLine: (line) => say(`building: ${line.trim()}`),
    what: 'next build',
    todo: 'The lines above say which file does not build. Correct it (or undo the last change), then start again.',
    isLong: true,
  })
  await writeFile(markFile(root), sources)
  return 'built'
}
