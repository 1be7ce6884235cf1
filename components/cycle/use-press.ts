'use client'

import type { OutboxItem } from '@/components/device/outbox-item'
import { useOutbox } from '@/components/device/use-outbox'
import { toast } from '@/components/ui/toast'
import { cycleKeys } from '@/lib/cycle/keys'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { doubtsChanged } from '@/lib/cycle/rules/half-words'
import type { BeginChangeInput, CyclePressInput, CycleStepInput, HalfChangeInput } from '@/lib/cycle/schema'
import { newId } from '@/lib/db/id'
import { withWaiting, type Waiting } from './waiting-presses'

type Half = { cycle: number; half: 'cold' | 'warm' }
const words = { begin: 'begins', hold: 'is held', 'go on': 'goes on', end: 'has ended' } as const
type Entry = {
  url: string
  body: Record<string, unknown>
  /** What became of the half, after its name. */
  done: string
  /** As it stands among what waits, where that says more. */
  what?: string
  /** What stood in the form. */
  draft?: { key: string; value: unknown }
}
type Answer = { doubted?: number; freed?: number } | null

/** One press or entry through the outbox: sent at once, or kept on the device and sent in order once. */
export function usePress(onDone: () => void) {
  const outbox = useOutbox((item) => (item.about.kind === 'cycle' ? onDone() : undefined))
  const kept = outbox.items.filter((item) => item.about.kind === 'cycle')

  async function enter(
    place: CyclePlace,
    half: { cycle: number; half: string },
    { url, body, done, what = done, draft }: Entry,
  ): Promise<void> {
    const name = `${half.half} half of cycle ${half.cycle}`
    const outcome = await outbox.send<Answer>({
      ...{ url, body, draft: draft ?? null },
      about: {
        kind: 'cycle',
        label: `${place.studyCode}, ${name}`,
        what,
        subject: place.id,
        href: '/cycles',
      },
    })
    const { doubted = 0, freed = 0 } = (outcome.how === 'sent' ? outcome.answer : null) ?? {}
    const changed = doubtsChanged({ doubted, freed }, 'now').join(' ')
    const detail = outcome.how === 'kept' ? 'Kept on this device; it goes out by itself.' : changed
    toast(`${place.studyCode}: the ${name} ${done}`, { density: 'bench', ...(detail ? { detail } : {}) })
    onDone()
  }

  function press(
    place: CyclePlace,
    half: Half,
    kind: keyof typeof words,
    more: Record<string, unknown> & { claimedAt?: string } = {},
  ): Promise<void> {
    const deviceNow = new Date().toISOString()
    return enter(place, half, {
      url: cycleKeys.press,
      body: {
        ...{ id: newId(), press: kind, studyStationId: place.id, cycle: half.cycle, half: half.half },
        ...{ claimedAt: deviceNow, deviceNow, ...more },
      },
      done: words[kind],
    })
  }

  const keptAt = (placeId: string) => kept.filter((item) => item.about.subject === placeId)
  return {
    press,
    enter,
    keptAt,
    /** As it will stand once what waits here has arrived; a refused entry changes nothing. */
    withKept: (place: CyclePlace, now: string) =>
      withWaiting(
        place,
        keptAt(place.id).flatMap((item) => (item.refusal ? [] : [waitingOf(item)])),
        now,
      ),
  }
}

function waitingOf({ url, body }: OutboxItem): Waiting {
  if (url === cycleKeys.press) return { what: 'press', input: body as CyclePressInput }
  const id = url.split('/').at(-2)!
  if (url === cycleKeys.correctBegin(id)) return { what: 'begin', id, input: body as BeginChangeInput }
  if (url === cycleKeys.correctHalf(id)) return { what: 'half', id, input: body as HalfChangeInput }
  return { what: 'paper', input: body as CycleStepInput }
}
