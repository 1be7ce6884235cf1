import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { Bench } from '@/lib/bench/queries/today'

/** One instrument's turn: a photo of each jar, or one attribute of each jar. */
export type WalkStep = { key: string; label: string; jars: BenchJar[]; done: number; waiting: number }

export const photoStep = 'photo'

/**
 * The day by instrument, in the order of the protocols: who has the viscometer in hand goes from jar to jar. `isIn` says
 * what of a jar is read or waits on this device.
 */
export function walkSteps(
  bench: Bench,
  isIn: (jar: BenchJar, attribute: string) => boolean,
  hasPhotos: boolean,
): WalkStep[] {
  const all = bench.stations.flatMap((station) => station.jars)
  const toRead = all.filter((jar) => jar.state === 'due' || jar.state === 'resting')
  const isAsked = (jar: BenchJar) => jar.fields.some((field) => !isIn(jar, field.attribute))
  // Asked for in two pulls it is read for the earlier one first.
  const open = toRead.filter(
    (jar) => !toRead.some((other) => other.code === jar.code && other.dueOn < jar.dueOn && isAsked(other)),
  )
  const labels = new Map(open.flatMap((jar) => jar.fields.map((field) => [field.attribute, field.label])))
  const steps = [...labels].map(([key, label]): WalkStep => {
    const asked = open.filter((jar) => jar.fields.some((field) => field.attribute === key))
    const left = asked.filter((jar) => !isIn(jar, key))
    const jars = left.filter(isAtHand)
    return { key, label, jars, done: asked.length - left.length, waiting: left.length - jars.length }
  })
  const photos: WalkStep = {
    key: photoStep,
    label: 'Photo',
    jars: open.filter(isAtHand),
    done: 0,
    waiting: 0,
  }
  return hasPhotos && photos.jars.length > 0 ? [photos, ...steps] : steps
}

/** A measuring jar is at hand once it has rested; a watch jar always is. */
function isAtHand(jar: BenchJar): boolean {
  return jar.state === 'due' ? jar.asks === 'watch' || jar.restHours === 0 : jar.isReady
}
