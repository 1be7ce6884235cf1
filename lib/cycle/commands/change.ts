import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { capital } from '@/lib/study/rules/words'
import type { CyclePlace } from '../queries/board'
import { whyNotChanged, type Logged } from '../rules/changing'

type Change = {
  entry: Logged & { isVoid: boolean }
  name: string
  /** How often it was written, and how often by what the person saw. */
  version: number
  seen: number
  /** What stands there now, for whoever saw something else. */
  lines: string[]
}

/** Who may not change a half, or saw another than stands there now, is told so with both. */
export function refuseChange(
  place: CyclePlace,
  actor: Actor,
  clock: { now: string; zone: string },
  { entry, name, version, seen, lines }: Change,
): void {
  if (place.studyState === 'closed')
    throw refuse.conflict(`Study ${place.studyCode} is closed, so its cycles stay as they are.`)
  if (entry.isVoid)
    throw refuse.stale(
      `${entry.by} has taken ${name} back, so there is nothing to change. Reload to see it.`,
      {
        by: entry.by,
        lines: ['taken back'],
      },
    )
  const person = { id: actor.personId, isFormulator: actor.roles.includes('formulator') }
  const why = whyNotChanged(entry, person, clock)
  // Whoever may not change it any longer is told what stands there, too, but not how to write over it.
  if (seen !== version)
    throw refuse.stale(
      `${capital(name)} was changed by ${entry.by} since you opened it. ${why ?? 'Look again.'}`,
      { ...(why ? {} : { version }), by: entry.by, lines },
    )
  if (why) throw refuse.forbidden(why)
}

/** What was pressed of a half that was taken back counts no more, and stays on record. */
export async function voidPresses(
  trx: Trx,
  actor: Actor,
  place: CyclePlace,
  { cycle, half }: { cycle: number; half: string },
  correctionReason: string,
  beginId = newId(),
): Promise<void> {
  const pressed = place.presses.filter((press) => press.cycle === cycle && press.half === half)
  if (pressed.length === 0) return
  await trx
    .insertInto('cyclePress')
    .values(
      pressed.map(({ id, press, at, reason }) => ({
        ...{
          id: press === 'begin' ? beginId : newId(),
          studyStationId: place.id,
          cycle,
          half,
          press,
          at,
          reason,
        },
        ...{ supersedesId: id, isVoid: true, correctionReason, recordedBy: actor.personId },
      })),
    )
    .execute()
}
