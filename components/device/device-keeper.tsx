'use client'

import { useEffect } from 'react'
import { useDevice } from './device-context'

/** Stands once on every page of the notebook: what waits goes out by itself, wherever its author is. */
export function DeviceKeeper() {
  const device = useDevice()

  useEffect(() => {
    if (!device) return
    const { outbox } = device
    const up = () => void outbox.flush()
    const down = () => outbox.noteReached(false)
    const shown = () => document.visibilityState === 'visible' && up()
    window.addEventListener('online', up)
    window.addEventListener('offline', down)
    document.addEventListener('visibilitychange', shown)
    if (!navigator.onLine) down()
    return () => {
      window.removeEventListener('online', up)
      window.removeEventListener('offline', down)
      document.removeEventListener('visibilitychange', shown)
    }
  }, [device])

  return null
}
