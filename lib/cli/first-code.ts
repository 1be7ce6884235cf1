import { appPool, db } from '@/lib/db/client'
import { env } from '@/lib/env'
import { makeFirstCode } from '@/lib/lab/commands'

// Prints what an empty lab needs: the one-time code by which its first manager is made.

try {
  const code = await makeFirstCode(db)
  if (code) {
    console.log(`The lab is empty. Open ${env().publicUrl}/setup and give this code, which works once:`)
    console.log(code)
  }
} finally {
  await appPool().end()
}
