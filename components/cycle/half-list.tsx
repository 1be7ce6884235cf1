import { orderOf, type Half } from '@/lib/cycle/rules/state'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import type { Person } from '@/lib/cycle/rules/changing'
import { HalfRow } from './half-row'
import type { usePress } from './use-press'

export type HalfListProps = {
  id: string
  place: CyclePlace
  now: string
  zone: string
  /** Null for whoever only reads. */
  person: Person | null
  presses: ReturnType<typeof usePress>
}

/** Every half up to the last one that was begun, the last first; one that was left out stands as a gap. */
export function HalfList({ id, place, person, ...props }: HalfListProps) {
  return (
    <div id={id} className="mt-2 w-full border-t border-hair">
      <ul>
        {halvesOf(place)
          .toReversed()
          .map((half) => (
            <HalfRow key={`${half.cycle} ${half.half}`} {...{ place, half, person, ...props }} />
          ))}
      </ul>
      {person ? (
        <p className="pt-2 text-17 text-soft">
          {person.isFormulator
            ? 'What you change stays on record, struck through, with your reason.'
            : 'You change on the day what you typed yourself; anything later or typed by others is changed by a formulator.'}
        </p>
      ) : null}
    </div>
  )
}

export function halvesOf({ steps, past, presses, pastBegins }: CyclePlace): { cycle: number; half: Half }[] {
  const last = Math.max(0, ...[...steps, ...past, ...presses, ...pastBegins].map(orderOf))
  return Array.from({ length: Math.max(0, last - 1) }, (_, index) => ({
    cycle: Math.floor(index / 2) + 1,
    half: index % 2 === 0 ? ('cold' as const) : ('warm' as const),
  }))
}
