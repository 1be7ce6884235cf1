import path from 'node:path'
import { tableOf } from './bench/figure'
import { build, isBuilt } from './build.mjs'
import { openCluster } from './cluster/open.mjs'
import { killServer } from './faults/kill-server'
import { orderlyEnd } from './shut-down.mjs'

// `npm run faults`: what is acknowledged survives a server that dies. Prints figures beside their targets, exits 1 on a miss.

const root = path.resolve(import.meta.dirname, '../..')
const say = (line: string) => console.log(line)
const end = orderlyEnd()
await end.after(main())
await end.now(Number(process.exitCode ?? 0))

async function main() {
  if (!process.env['TEST_DATABASE_ADMIN_URL']) {
    const dataFolder = path.join(root, '.data', 'test')
    const cluster = await openCluster({ dataFolder, isForTests: true, say, onStarting: end.with })
    process.env['TEST_DATABASE_ADMIN_URL'] = cluster.url('admin', 'postgres')
  }
  if (!(await isBuilt(root))) await build(root, process.env, say)
  const { figures, refused } = await killServer({ root, saves: 200, kills: 10, writers: 8, say })
  for (const sentence of refused.slice(0, 10)) say(`refused: ${sentence}`)
  say(tableOf(figures))
  if (figures.some((figure) => figure.isMet === false)) process.exitCode = 1
}
