'use client'

import { useEffect, useRef, useState } from 'react'
import type { RefObject } from 'react'

/** An element's width as it is laid out; until it is known (and on the server) the one expected. */
export function useWidth<T extends HTMLElement>(expected: number): [RefObject<T | null>, number] {
  const ref = useRef<T>(null)
  const [width, setWidth] = useState(expected)
  useEffect(() => {
    const element = ref.current
    if (!element) return
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setWidth(Math.floor(entry.contentRect.width))
    })
    observer.observe(element)
    return () => observer.disconnect()
  }, [])
  return [ref, width]
}
