'use client'

import { useOutbox } from '@/components/device/use-outbox'
import { toast } from '@/components/ui/toast'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { cycleKeys } from '@/lib/cycle/keys'
import type { CyclePressInput } from '@/lib/cycle/schema'
import { newId } from '@/lib/db/id'
import { withWaiting } from './waiting-presses'

type Half = { cycle: number; half: 'cold' | 'warm' }
const words = { begin: 'begins', hold: 'is held', 'go on': 'goes on', end: 'has ended' } as const

/** One press through the outbox: sent at once, or kept on the device and sent in order once. */
export function usePress(onDone: () => void) {
  const outbox = useOutbox((item) => (item.about.kind === 'cycle' ? onDone() : undefined))
  const kept = outbox.items.filter((item) => item.about.kind === 'cycle')
  async function press(
    place: CyclePlace,
    half: Half,
    kind: keyof typeof words,
    more: Record<string, unknown> & { claimedAt?: string } = {},
  ): Promise<void> {
    const name = `${half.half} half of cycle ${half.cycle}`
    const deviceNow = new Date().toISOString()
    const outcome = await outbox.send({
      url: cycleKeys.press,
      body: {
        id: newId(),
        press: kind,
        studyStationId: place.id,
        cycle: half.cycle,
        half: half.half,
        claimedAt: deviceNow,
        deviceNow,
        ...more,
      },
      about: {
        kind: 'cycle',
        label: `${place.studyCode}, ${name}`,
        what: words[kind],
        subject: place.id,
        href: '/cycles',
      },
    })
    toast(`${place.studyCode}: the ${name} ${words[kind]}`, {
      density: 'bench',
      ...(outcome.how === 'kept' ? { detail: 'Kept on this device; it goes out by itself.' } : {}),
    })
    onDone()
  }
  const keptAt = (placeId: string) => kept.filter((item) => item.about.subject === placeId)
  return {
    press,
    keptAt,
    /** As it will stand once what waits here has arrived; a refused press changes nothing. */
    withKept: (place: CyclePlace, now: string) =>
      withWaiting(
        place,
        keptAt(place.id).flatMap(({ body, refusal }) => (refusal ? [] : [body as CyclePressInput])),
        now,
      ),
  }
}
