'use client'

import { useEffect } from 'react'

/**
 * Keeps the screen lit while a pull is open. The browser takes the lock back when the page is hidden, so it is asked
 * for again when the page is shown; where it cannot be had, the screen sleeps as the device likes.
 */
export function useAwake(isOn: boolean): void {
  useEffect(() => {
    if (!isOn || !('wakeLock' in navigator)) return
    let lock: WakeLockSentinel | null = null
    let isLeft = false
    async function hold() {
      if (document.visibilityState !== 'visible') return
      try {
        const held = await navigator.wakeLock.request('screen')
        if (isLeft) await held.release()
        else lock = held
      } catch {
        // Low battery or a setting forbids it.
      }
    }
    void hold()
    document.addEventListener('visibilitychange', hold)
    return () => {
      isLeft = true
      document.removeEventListener('visibilitychange', hold)
      void lock?.release()
    }
  }, [isOn])
}
