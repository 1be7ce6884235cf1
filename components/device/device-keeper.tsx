'use client'

import { useEffect } from 'react'
import { loadDialog } from '@/components/ui/dialog'
import { useLoadAhead } from '@/components/ui/load-ahead'
import { useDevice } from './device-context'
import { rememberLastPerson } from './last-person'
import { workerAddress } from './use-ready'

/** Stands once on every page of the notebook: what waits goes out by itself, wherever its author is. */
export function DeviceKeeper({ person }: { person: { personId: string; initials: string } }) {
  const device = useDevice()
  const { personId, initials } = person
  useLoadAhead(loadDialog)

  useEffect(() => {
    if (!device) return
    const { outbox } = device
    const up = () => void outbox.flush()
    const down = () => outbox.noteReached(false)
    const shown = () => document.visibilityState === 'visible' && up()
    window.addEventListener('online', up)
    window.addEventListener('offline', down)
    document.addEventListener('visibilitychange', shown)
    navigator.serviceWorker?.addEventListener('message', up)
    if (!navigator.onLine) down()
    return () => {
      window.removeEventListener('online', up)
      window.removeEventListener('offline', down)
      document.removeEventListener('visibilitychange', shown)
      navigator.serviceWorker?.removeEventListener('message', up)
    }
  }, [device])

  useEffect(() => {
    rememberLastPerson({ personId, initials })
    // The browser may ask its user, or say no; then it throws things away only when it runs out of room.
    void navigator.storage?.persist?.().catch(() => undefined)
    // In development files change under their names.
    if (process.env.NODE_ENV === 'production')
      void navigator.serviceWorker?.register(workerAddress).catch(() => undefined)
  }, [personId, initials])

  return null
}
