import { useEffect } from 'react'

const tries = 30
const betweenMs = 1_000

/** Loads what is not shown at first as soon as the page stands, so that it opens at once and the network may go. */
export function useLoadAhead(load: () => Promise<unknown>): void {
  useEffect(() => {
    // Without network it comes from the device, or when it is asked for.
    load().catch(() => undefined)
  }, [load])
}

/**
 * Where the network is away just then, what is asked for comes once it is back, and the page stays as it is. Only what
 * fails while the device says that it has a network is given up after a while.
 */
export async function whenReached<T>(load: () => Promise<T>): Promise<T> {
  let left = tries
  while (left > 0) {
    try {
      return await load()
    } catch {
      if (navigator.onLine) left -= 1
      await new Promise((resolve) => setTimeout(resolve, betweenMs))
    }
  }
  return load()
}
