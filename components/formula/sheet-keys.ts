import type { KeyboardEvent } from 'react'

/**
 * The keyboard's way through a sheet whose fields carry data-row and data-col: Enter and the arrows up and
 * down go to the same column of the next row, left and right leave a field at its end. Says whether the
 * last row was left downwards, so that the sheet can add one.
 */
export function walkSheet(event: KeyboardEvent<HTMLElement>): 'past the end' | 'moved' | 'nothing' {
  const from = event.target
  if (!(from instanceof HTMLInputElement) || from.dataset.row === undefined || event.altKey) return 'nothing'
  const sheet = event.currentTarget
  const col = from.dataset.col ?? ''
  const rows = [...sheet.querySelectorAll<HTMLInputElement>(`input[data-col="${col}"]`)]
  const here = rows.indexOf(from)
  const isUp = event.key === 'ArrowUp' || (event.key === 'Enter' && event.shiftKey)
  const isDown = event.key === 'ArrowDown' || (event.key === 'Enter' && !event.shiftKey)
  if (isUp || isDown) {
    event.preventDefault()
    const next = rows[here + (isUp ? -1 : 1)]
    if (next) focusWhole(next)
    return next ? 'moved' : isDown && event.key === 'Enter' ? 'past the end' : 'nothing'
  }
  if (event.key !== 'ArrowLeft' && event.key !== 'ArrowRight') return 'nothing'
  const isLeft = event.key === 'ArrowLeft'
  const isText = from.type === 'text'
  const atEnd = !isText || (isLeft ? from.selectionEnd === 0 : from.selectionStart === from.value.length)
  if (!atEnd) return 'nothing'
  const inRow = [...sheet.querySelectorAll<HTMLInputElement>(`input[data-row="${from.dataset.row}"]`)]
  const next = inRow[inRow.indexOf(from) + (isLeft ? -1 : 1)]
  if (!next) return 'nothing'
  event.preventDefault()
  focusWhole(next)
  return 'moved'
}

export function focusWhole(input: HTMLInputElement) {
  input.focus()
  if (input.type === 'text') input.select()
}

/** After the next paint, when a row that was just added has its fields. */
export function focusCell(sheet: HTMLElement | null, row: string, col: string) {
  requestAnimationFrame(() => {
    const input = sheet?.querySelector<HTMLInputElement>(`input[data-row="${row}"][data-col="${col}"]`)
    if (input) focusWhole(input)
  })
}
