import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudyOfPullJar } from '@/lib/series/commands'
import { findPullJar } from '../queries/pull-jar'
import { refuseDone, refuseOver, refuseStale } from '../rules/refusals'
import type { OpeningOfJar } from '../schema'

/** After this long an open jar that nobody saved is nobody's. */
const openForMs = 30 * 60_000

export type OpenedJar = {
  version: number
  openedBy: { personId: string; name: string; initials: string; at: string }
  /** Someone else has it open and keeps it; say so, and send again with `takeOver` to go on with it. */
  isOthers: boolean
}

/** Says on the Bench who has a jar in hand. It keeps nobody out: the second person is told. */
export async function openJar(
  trx: Trx,
  actor: Actor,
  pullJarId: string,
  input: OpeningOfJar,
): Promise<OpenedJar> {
  await lockStudyOfPullJar(trx, pullJarId)
  const jar = await findPullJar(trx, pullJarId)
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  refuseOver(jar)
  refuseDone(jar)
  const isOpen = jar.openedBy !== null && Date.parse(jar.now) - Date.parse(jar.openedAt!) < openForMs
  if (isOpen && (jar.openedBy === actor.personId || !input.takeOver)) {
    return {
      version: jar.version,
      openedBy: {
        personId: jar.openedBy!,
        name: jar.openerName!,
        initials: jar.openerInitials!,
        at: jar.openedAt!,
      },
      isOthers: jar.openedBy !== actor.personId,
    }
  }
  refuseStale(jar, input.version)
  const opened = await trx
    .updateTable('pullJar')
    .set({ openedBy: actor.personId, openedAt: jar.now, version: jar.version + 1 })
    .where('id', '=', pullJarId)
    .where('version', '=', input.version)
    .returning('version')
    .executeTakeFirst()
  if (!opened) refuseStale(jar, -1)
  return {
    version: opened!.version,
    openedBy: { personId: actor.personId, name: actor.name, initials: actor.initials, at: jar.now },
    isOthers: false,
  }
}
