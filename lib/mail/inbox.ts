import { readdir, readFile } from 'node:fs/promises'
import path from 'node:path'
import type { Db } from '@/lib/db/client'
import { env } from '@/lib/env'
import { refuse } from '@/lib/http/errors'
import * as z from '@/lib/http/zod'
import { findLab } from '@/lib/lab/queries'
import { mailFolder } from './fake'

const keptMail = z.object({
  id: z.string(),
  to: z.array(z.string()),
  from: z.string(),
  subject: z.string(),
  text: z.string(),
  at: z.string(),
})

export type KeptMail = z.infer<typeof keptMail>

export const mailsKey = '/api/mails'

/** Whether messages go to the fake and may be read by the manager. */
export async function hasMailPage(db: Db): Promise<boolean> {
  return env().demo && env().smtpUrl === null && Boolean((await findLab(db))?.demoFilledAt)
}

/** Newest first. Elsewhere than in the demo with its fake there is no such page. */
export async function listMails(db: Db): Promise<KeptMail[]> {
  if (!(await hasMailPage(db))) throw refuse.notFound()
  const files = await readdir(mailFolder()).catch(() => [])
  const mails = await Promise.all(
    files
      .filter((file) => file.endsWith('.json'))
      .map(async (file) => keptMail.parse(JSON.parse(await readFile(path.join(mailFolder(), file), 'utf8')))),
  )
  return mails.sort((one, other) => other.at.localeCompare(one.at)).slice(0, 200)
}
