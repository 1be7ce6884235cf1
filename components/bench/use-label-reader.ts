'use client'

import { useEffect, useRef } from 'react'

/** A reader types faster than a hand: at most so long between two signs. */
const gapMs = 60
const fewestSigns = 5

/** A label reader that types a code and presses Enter is heard wherever no field has the focus and no dialog is open. */
export function useLabelReader(onRead: (text: string) => void): void {
  const hear = useRef(onRead)
  useEffect(() => {
    hear.current = onRead
  })
  useEffect(() => {
    let text = ''
    let lastAt = 0
    function press(event: KeyboardEvent) {
      const target = event.target as HTMLElement | null
      const isElsewhere = target?.closest('input, textarea, select, [contenteditable], [role="dialog"]')
      if (isElsewhere || event.ctrlKey || event.metaKey || event.altKey) return
      const isFast = event.timeStamp - lastAt < gapMs
      lastAt = event.timeStamp
      if (event.key === 'Enter') {
        const read = isFast ? text : ''
        text = ''
        if (read.length < fewestSigns) return
        // The button that has the focus is not meant.
        event.preventDefault()
        event.stopPropagation()
        hear.current(read)
      } else if (event.key.length === 1) {
        text = isFast ? text + event.key : event.key
        if (isFast && event.key === ' ') event.preventDefault()
      }
    }
    window.addEventListener('keydown', press, { capture: true })
    return () => window.removeEventListener('keydown', press, { capture: true })
  }, [])
}
