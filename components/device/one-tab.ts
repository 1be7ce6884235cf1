import { newId } from '@/lib/db/id'
import type { Store } from './store'

const leaseMs = 20_000
const lookAgainMs = 1_000

/**
 * Does it while no other tab of this browser does. Browsers lock by themselves on https; on plain http the tabs pass a
 * lease around, which one that was killed leaves to the next.
 */
export function oneTabAtATime(store: Store) {
  const tab = newId()
  return async (name: string, act: () => Promise<void>): Promise<void> => {
    if (navigator.locks) return void (await navigator.locks.request(name, act))
    while (!(await store.takeLease(name, tab, leaseMs))) await wait(lookAgainMs)
    const renewing = setInterval(() => void store.takeLease(name, tab, leaseMs), leaseMs / 4)
    try {
      await act()
    } finally {
      clearInterval(renewing)
      await store.endLease(name)
    }
  }
}

const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms))
