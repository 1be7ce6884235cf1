import { useEffect, useState } from 'react'

/** A value once it has not changed for so many milliseconds, so that not every keystroke asks the server. */
export function useSettled<T>(value: T, afterMs: number): T {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), afterMs)
    return () => clearTimeout(timer)
  }, [value, afterMs])
  return settled
}
