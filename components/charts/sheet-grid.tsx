'use client'

import Link from 'next/link'
import { useRef, useState } from 'react'
import type { KeyboardEvent, MouseEvent } from 'react'
import type { SheetSelection } from './sheet-drawing'
import type { PlacedRow, SheetCell, SheetLayout, SheetProps } from './sheet-layout'
import { cellName, rowName } from './sheet-names'

type Place = { row: number; cell: number }

/**
 * What is touched: one grid with a single tab stop, arrow keys from jar to jar. It lies over the
 * drawing and shows nothing but the focus ring.
 */
export function SheetGrid({
  sheet,
  layout,
  title,
  selected,
  onSelect,
}: {
  sheet: SheetProps
  layout: SheetLayout
  title: string
  selected: SheetSelection | null
  onSelect?: (selection: SheetSelection) => void
}) {
  const grid = useRef<HTMLDivElement>(null)
  const [active, setActive] = useState<Place>(() => firstPlace(layout.rows, selected))

  const go = (place: Place) => {
    setActive(place)
    const cell = grid.current?.querySelector<HTMLElement>(`[data-place="${place.row}-${place.cell}"]`)
    cell?.focus()
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' })
  }

  const onKeyDown = (event: KeyboardEvent) => {
    const next = nextPlace(event.key, active, layout.rows)
    if (!next) return
    event.preventDefault()
    go(next)
  }

  return (
    <div ref={grid} role="grid" aria-label={title} onKeyDown={onKeyDown} className="absolute inset-0">
      {layout.rows.map((placed, row) => (
        <div key={placed.row.id} role="row">
          <span role="rowheader" className="sr-only">
            {`${rowName(placed.row)}, ${placed.row.note}, ${placed.row.standing}`}
          </span>
          {placed.row.cells.map((cell, index) => (
            <Cell
              key={cell.weeks}
              cell={cell}
              placed={placed}
              layout={layout}
              name={cellName(placed.row, cell, sheet.startOn, sheet.endWeeks)}
              place={`${row}-${index}`}
              isTabStop={active.row === row && active.cell === index}
              isSelected={selected?.rowId === placed.row.id && selected.weeks === cell.weeks}
              onFocus={() => setActive({ row, cell: index })}
              onSelect={onSelect}
            />
          ))}
        </div>
      ))}
    </div>
  )
}

function Cell({
  cell,
  placed,
  layout,
  name,
  place,
  isTabStop,
  isSelected,
  onFocus,
  onSelect,
}: {
  cell: SheetCell
  placed: PlacedRow
  layout: SheetLayout
  name: string
  place: string
  isTabStop: boolean
  isSelected: boolean
  onFocus: () => void
  onSelect?: (selection: SheetSelection) => void
}) {
  const half = Math.max(17, layout.glyph * (cell.posture === 'lying' ? 0.6 : 0.4))
  const box = {
    left: layout.scale.x(cell.weeks) - half,
    top: placed.jarTop - 6,
    width: half * 2,
    height: layout.glyph + 30,
  }
  const shared = {
    'data-place': place,
    'aria-label': name,
    tabIndex: isTabStop ? 0 : -1,
    onFocus,
    className: 'absolute block rounded-[4px]',
    style: box,
  }
  const canSelect = onSelect !== undefined && cell.state === 'read'
  // The first press shows the jar's strip, the second opens the jar; held keys open it at once.
  const select = (event: MouseEvent) => {
    if (!canSelect || isSelected || event.metaKey || event.ctrlKey || event.shiftKey) return
    event.preventDefault()
    onSelect({ rowId: placed.row.id, weeks: cell.weeks })
  }
  return (
    <div role="gridcell" aria-selected={canSelect ? isSelected : undefined}>
      {cell.href ? (
        <Link href={cell.href} onClick={select} {...shared} />
      ) : canSelect ? (
        <button type="button" onClick={select} {...shared} />
      ) : (
        <span role="img" {...shared} />
      )}
    </div>
  )
}

function firstPlace(rows: PlacedRow[], selected: SheetSelection | null): Place {
  const row = rows.findIndex((placed) => placed.row.id === selected?.rowId)
  const cell = rows[row]?.row.cells.findIndex((one) => one.weeks === selected?.weeks) ?? -1
  return cell >= 0 ? { row, cell } : { row: 0, cell: 0 }
}

export function nextPlace(key: string, from: Place, rows: PlacedRow[]): Place | null {
  const cells = rows[from.row]?.row.cells ?? []
  switch (key) {
    case 'ArrowLeft':
      return from.cell > 0 ? { ...from, cell: from.cell - 1 } : null
    case 'ArrowRight':
      return from.cell < cells.length - 1 ? { ...from, cell: from.cell + 1 } : null
    case 'Home':
      return { ...from, cell: 0 }
    case 'End':
      return { ...from, cell: Math.max(0, cells.length - 1) }
    case 'ArrowUp':
    case 'ArrowDown': {
      const row = from.row + (key === 'ArrowUp' ? -1 : 1)
      const weeks = cells[from.cell]?.weeks ?? 0
      const others = rows[row]?.row.cells ?? []
      if (others.length === 0) return null
      const nearest = others.reduce(
        (best, cell, index) =>
          Math.abs(cell.weeks - weeks) < Math.abs((others[best]?.weeks ?? Infinity) - weeks) ? index : best,
        0,
      )
      return { row, cell: nearest }
    }
    default:
      return null
  }
}
