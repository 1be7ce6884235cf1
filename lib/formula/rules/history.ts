/** What was, what is and what was taken back. */
export type History<T> = {
  past: readonly T[]
  now: T
  future: readonly T[]
  /** What the last change was made to; more typing there is the same step. */
  at: string | null
}

/** How many steps can be taken back. */
const depth = 200

export function begin<T>(now: T): History<T> {
  return { past: [], now, future: [], at: null }
}

/** A change as a step of its own, or as more of the last one where `at` names the same place. */
export function record<T>(history: History<T>, now: T, at: string | null): History<T> {
  if (now === history.now) return history
  if (at !== null && at === history.at) return { ...history, now, future: [] }
  return { past: [...history.past, history.now].slice(-depth), now, future: [], at }
}

export function undo<T>({ past, now, future, ...rest }: History<T>): History<T> {
  const before = past.at(-1)
  if (before === undefined) return { past, now, future, ...rest }
  return { past: past.slice(0, -1), now: before, future: [now, ...future], at: null }
}

export function redo<T>({ past, now, future, ...rest }: History<T>): History<T> {
  const [next, ...later] = future
  if (next === undefined) return { past, now, future, ...rest }
  return { past: [...past, now], now: next, future: later, at: null }
}
