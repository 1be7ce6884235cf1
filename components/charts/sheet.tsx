'use client'

import { useEffect, useMemo, useRef, useState } from 'react'
import { SheetDrawing } from './sheet-drawing'
import type { SheetSelection } from './sheet-drawing'
import { SheetFlagList, SheetFlags } from './sheet-flags'
import { SheetGrid } from './sheet-grid'
import { sheetLayout } from './sheet-layout'
import type { SheetProps } from './sheet-layout'
import { SheetStations } from './sheet-stations'
import { SheetTable } from './sheet-table'
import { TimeRuler } from './time-ruler'
import { unitOf } from './time-scale'
import { useWidth } from './use-width'

const STATION_WIDTH = 196
const NARROW_STATION_WIDTH = 128
/** The jar of time zero reaches this far left of it. */
const ZERO_JAR = 28

/**
 * A study's sheet: stations by time points on one ruler, the front, flags and forecasts in the unspent
 * time. The ruler stays on top and the stations at the left while the rest moves.
 */
export function Sheet({
  title,
  selected = null,
  onSelect,
  stickyTop = 0,
  ...sheet
}: SheetProps & {
  title: string
  selected?: SheetSelection | null
  onSelect?: (selection: SheetSelection) => void
  stickyTop?: number
}) {
  const [box, available] = useWidth<HTMLDivElement>(1360)
  const ruler = useRef<HTMLDivElement>(null)
  const [isTable, setIsTable] = useState(false)
  const isNarrow = available < 760
  const stationWidth = isNarrow ? NARROW_STATION_WIDTH : STATION_WIDTH
  const { startOn, endWeeks, todayWeeks, rows, flags } = sheet
  const layout = useMemo(
    () => sheetLayout({ startOn, endWeeks, todayWeeks, rows, flags }, available, stationWidth, isNarrow),
    [startOn, endWeeks, todayWeeks, rows, flags, available, stationWidth, isNarrow],
  )
  const scroller = useRef<HTMLDivElement>(null)
  const isWider = layout.width > available + 1
  const todayX = todayWeeks === null ? layout.width : layout.scale.x(todayWeeks)
  // Where not all of it fits, the sheet opens at today: what is due matters before what was.
  useEffect(() => {
    if (scroller.current && isWider) scroller.current.scrollLeft = todayX - available * 0.7
  }, [isWider, todayX, available])
  const coverWidth = stationWidth - ZERO_JAR
  return (
    <section aria-label={title} ref={box} className="min-w-0">
      <div ref={ruler} className="sticky z-20 overflow-hidden bg-ground pt-1" style={{ top: stickyTop }}>
        <TimeRuler
          scale={layout.scale}
          startOn={startOn}
          points={layout.points}
          todayWeeks={todayWeeks}
          width={layout.width}
          left={coverWidth}
          caption=""
        />
        <div className="absolute inset-y-0 left-0 bg-ground" style={{ width: coverWidth }} aria-hidden>
          <span className="absolute top-[24px] right-0 text-15 text-soft">{unitOf(endWeeks)}</span>
        </div>
      </div>
      <div
        ref={scroller}
        className="overflow-x-auto overflow-y-hidden"
        onScroll={(event) => {
          if (ruler.current) ruler.current.scrollLeft = event.currentTarget.scrollLeft
        }}
      >
        <div className="relative" style={{ width: layout.width, height: layout.height }}>
          <SheetDrawing sheet={sheet} layout={layout} selected={selected} />
          <SheetGrid sheet={sheet} layout={layout} title={title} selected={selected} onSelect={onSelect} />
          {isNarrow ? null : <SheetFlags layout={layout} stationWidth={stationWidth} />}
          <SheetStations layout={layout} width={coverWidth} isNarrow={isNarrow} />
        </div>
      </div>
      {isNarrow ? <SheetFlagList rows={rows} flags={flags} /> : null}
      <button
        type="button"
        className="min-h-9 text-13 text-soft underline underline-offset-2"
        aria-expanded={isTable}
        onClick={() => setIsTable(!isTable)}
      >
        {isTable ? 'Put the table away' : 'Read the sheet as a table'}
      </button>
      {isTable ? (
        <SheetTable sheet={sheet} caption={`${title}. Separation in percent of the fill height.`} />
      ) : null}
    </section>
  )
}
