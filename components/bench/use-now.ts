'use client'

import { useEffect, useState } from 'react'

/** The server's time as it goes on, so that what rests counts down by the clock that will judge it. */
export function useNow(serverNow: string): number {
  const [shift, setShift] = useState(0)
  const [now, setNow] = useState(() => Date.parse(serverNow))
  useEffect(() => {
    // The difference is taken when an answer comes: the server knows no device.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setShift(Date.parse(serverNow) - Date.now())
  }, [serverNow])
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now() + shift), 15_000)
    return () => clearInterval(timer)
  }, [shift])
  return now
}
