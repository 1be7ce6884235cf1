import { useSyncExternalStore } from 'react'

const narrow = '(max-width: 1023px)'

/** Whether the page is held in the hand: a batch is weighed on a tablet and read at the desk. */
export function useBench(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia(narrow)
      query.addEventListener('change', changed)
      return () => query.removeEventListener('change', changed)
    },
    () => window.matchMedia(narrow).matches,
    () => false,
  )
}
