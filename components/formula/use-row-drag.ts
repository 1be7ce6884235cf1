'use client'

import { useCallback, useState, type PointerEvent, type RefObject } from 'react'

export type Drop = { besideId: string; side: 'before' | 'after' }
export type StartDrag = (event: PointerEvent<HTMLElement>, id: string) => void

/**
 * Rows that carry data-line are dragged by their grip; the place where one would stand is shown while it
 * moves. Alt with the arrows does the same from the keyboard.
 */
export function useRowDrag(
  sheet: RefObject<HTMLElement | null>,
  onDrop: (id: string, besideId: string, side: Drop['side']) => void,
) {
  const [drop, setDrop] = useState<Drop | null>(null)
  const start: StartDrag = useCallback(
    (event, id) => {
      if (event.button !== 0) return
      event.preventDefault()
      const grip = event.currentTarget
      grip.setPointerCapture(event.pointerId)
      let now: Drop | null = null
      const end = new AbortController()
      const move = (at: globalThis.PointerEvent) => {
        now = placeAt(sheet.current, at.clientY, id)
        setDrop(now)
      }
      const finish = (isDropped: boolean) => {
        end.abort()
        setDrop(null)
        if (isDropped && now) onDrop(id, now.besideId, now.side)
      }
      const { signal } = end
      grip.addEventListener('pointermove', move, { signal })
      grip.addEventListener('pointerup', () => finish(true), { signal })
      grip.addEventListener('pointercancel', () => finish(false), { signal })
      document.addEventListener('keydown', (key) => key.key === 'Escape' && finish(false), { signal })
    },
    [sheet, onDrop],
  )
  return { drop, start }
}

function placeAt(sheet: HTMLElement | null, y: number, id: string): Drop | null {
  const rows = [...(sheet?.querySelectorAll<HTMLElement>('[data-line]') ?? [])]
  const boxes = rows.map((row) => ({ id: row.dataset['line'] ?? '', box: row.getBoundingClientRect() }))
  const under = boxes.find(({ box }) => y < box.bottom) ?? boxes.at(-1)
  if (!under || under.id === id) return null
  return { besideId: under.id, side: y < under.box.top + under.box.height / 2 ? 'before' : 'after' }
}
