import { useEffect } from 'react'

/** Loads what is not shown at first once the page stands, so that it opens at once and the network may go. */
export function useLoadAhead(load: () => Promise<unknown>): void {
  useEffect(() => {
    // Without network it comes from the device, or when it is asked for.
    const timer = setTimeout(() => load().catch(() => undefined), 500)
    return () => clearTimeout(timer)
  }, [load])
}
