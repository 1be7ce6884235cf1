'use client'

import { useEffect, useState, type RefObject } from 'react'

export type RowMiddles = { height: number; targets: Record<string, number> }

/**
 * Where the rows that carry data-line stand within their sheet, for the jar's leader lines. Measured anew
 * when the sheet changes its size and when `order` says that rows have moved.
 */
export function useRowMiddles(sheet: RefObject<HTMLElement | null>, order: string): RowMiddles | null {
  const [middles, setMiddles] = useState<RowMiddles | null>(null)
  useEffect(() => {
    const element = sheet.current
    if (!element) return
    const observer = new ResizeObserver(() => {
      const table = element.querySelector('table')
      if (!table) return
      const top = element.getBoundingClientRect().top
      const rows = [...element.querySelectorAll<HTMLElement>('[data-line]')]
      const targets = rows.map((row) => {
        const box = row.getBoundingClientRect()
        return [row.dataset.line ?? '', box.top - top + Math.min(box.height / 2, 18)] as const
      })
      setMiddles({ height: table.getBoundingClientRect().height, targets: Object.fromEntries(targets) })
    })
    observer.observe(element)
    return () => observer.disconnect()
  }, [sheet, order])
  return middles
}
