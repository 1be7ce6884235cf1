import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudy } from '@/lib/series/commands'
import { findFlag, type FlagRow } from '../queries/one'

/** The flag as it stands once nobody else can change it, or a refusal that says who came before. */
export async function claimFlag(trx: Trx, number: number, version: number): Promise<FlagRow> {
  const found = await trx.selectFrom('flag').select('studyId').where('number', '=', number).executeTakeFirst()
  if (!found) throw refuse.notFound('There is no flag with this number.')
  await lockStudy(trx, found.studyId)
  const flag = (await findFlag(trx, number))!
  if (flag.version !== version) {
    const who = flag.closedByName ?? flag.answeredByName
    const what = flag.state === 'closed' ? 'closed' : 'answered'
    throw refuse.stale(
      `${who ?? 'Someone'} has ${what} flag ${number} since you opened it. What you wrote is still here; look at what stands now.`,
      {
        version: flag.version,
        state: flag.state,
        by: who,
        cause: flag.cause,
        action: flag.action,
        why: flag.why,
      },
    )
  }
  if (flag.state === 'closed')
    throw refuse.conflict(`Flag ${number} is closed. Write a comment, if there is more to say.`)
  return flag
}
