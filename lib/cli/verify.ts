import { appPool, db } from '@/lib/db/client'
import type { Check } from './checks/check'
import { signatures } from './checks/signatures'
import { trailRows } from './checks/trail-rows'
import { headOfSeal, trailSeal } from './checks/trail-seal'

// npm run verify: recomputes what the database must agree with by itself. Exit 0 only if nothing is found.

const checks: readonly Check[] = [trailSeal, trailRows, signatures]

try {
  for (const { name, run } of checks) {
    const found = await run(db)
    console.log(`${name}: ${found.length === 0 ? 'nothing found' : `${found.length} found`}`)
    for (const sentence of found) console.log(`  ${sentence}`)
    if (found.length > 0) process.exitCode = 1
  }
  console.log(await headOfSeal(db))
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error))
  process.exitCode = 2
} finally {
  await appPool().end()
}
