import { attributeName } from '@/lib/reading/schema/attributes'
import type { SheetFlag, SheetProps, SheetRow } from '@/components/charts/sheet-layout'
import type { StripAttribute } from '@/components/charts/cell-strip'
import type { SheetPage, SheetShelf } from '@/lib/study/queries/sheet'
import { inSentence } from '@/lib/study/rules/finding'
import { addDays, spokenDay } from '@/lib/study/rules/calendar'

/** One batch's shelves as the chart draws them. */
export function sheetProps(sheet: SheetPage, batchId: string): SheetProps {
  const shelves = sheet.shelves.find((one) => one.batchId === batchId)?.rows ?? []
  // What is out stands first; the rest as it was raised.
  const flags = sheet.flags
    .filter((flag) => flag.batchId === batchId)
    .toSorted((a, b) => Number(b.level === 'out') - Number(a.level === 'out') || a.number - b.number)
  return {
    startOn: sheet.study.startedOn,
    endWeeks: sheet.study.endWeeks,
    todayWeeks: sheet.todayWeeks,
    rows: shelves.map((shelf) => rowOf(shelf, sheet, flags)),
    flags: flags.flatMap((flag) => (flag.studyStationId ? [flagOf(flag, shelves, sheet)] : [])),
  }
}

function rowOf(shelf: SheetShelf, sheet: SheetPage, flags: SheetPage['flags']): SheetRow {
  const { station, nearest } = shelf
  const own = flags.filter((flag) => flag.studyStationId === station.id)
  return {
    id: station.id,
    label: String(station.temperatureC ?? Math.round(station.meanC ?? 25)).replace('-', '−'),
    kind: station.isFreezeThaw ? 'freeze-thaw' : 'temperature',
    temperatureC: station.temperatureC ?? 25,
    note: noteOf(shelf),
    standing: shelf.standing,
    cells: shelf.cells.map((cell) => ({
      weeks: cell.weeks,
      state: cell.state,
      topPercent: cell.topPercent,
      bottomPercent: cell.bottomPercent,
      separationPercent: cell.separationPercent,
      detectionPercent: sheet.detectionPercent,
      isTrace: cell.isTrace,
      bleed: cell.bleed,
      creamPercent: cell.creamPercent,
      mishaps: cell.mishaps.map(({ kind }) => kind),
      posture: cell.posture,
      label: cell.label,
      flagNumbers: own
        .filter((flag) => flag.atWeeks !== null && nearestCell(shelf, flag.atWeeks) === cell.weeks)
        .map((flag) => flag.number),
    })),
    frontWeeks: shelf.frontWeeks,
    frontForecastWeeks: shelf.leavesAt?.weeks ?? null,
    leavesLow: shelf.leavesAt?.low ?? null,
    leavesHigh: shelf.leavesAt?.high ?? null,
    remark:
      shelf.standing === 'steady' && nearest && nearest.used > 0.005 && hasUnspentTime(sheet)
        ? `Nearest its edge: ${inSentence(nearest.attribute)}, ${Math.round(nearest.used * 100)} % of the band used`
        : null,
  }
}

/** A remark stands in the unspent time; where little is left it would be cut off. */
function hasUnspentTime({ todayWeeks, study }: SheetPage): boolean {
  return todayWeeks !== null && todayWeeks / study.endWeeks < 0.7
}

function noteOf({ station }: SheetShelf): string {
  const cycle =
    station.isFreezeThaw && station.cycleLowC !== null && station.cycleHighC !== null
      ? `${String(station.cycleLowC).replace('-', '−')} to ${station.cycleHighC} °C`
      : null
  const mean =
    station.meanC === null || cycle ? cycle : `mean ${station.meanC.toFixed(1).replace('-', '−')} °C`
  const ended = station.endedOn ? `ended ${spokenDay(station.endedOn, false)}` : null
  const name = station.name.charAt(0).toLowerCase() + station.name.slice(1)
  return [station.variant, name, mean, ended].filter(Boolean).join(', ')
}

/** A flag is planted where its reading stands. */
function nearestCell(shelf: SheetShelf, atWeeks: number): number {
  return shelf.cells.reduce(
    (best, cell) => (Math.abs(cell.weeks - atWeeks) < Math.abs(best - atWeeks) ? cell.weeks : best),
    0,
  )
}

function flagOf(flag: SheetPage['flags'][number], shelves: SheetShelf[], sheet: SheetPage): SheetFlag {
  const shelf = shelves.find((one) => one.station.id === flag.studyStationId)
  const isForecast = flag.rule === 'lean' && flag.attribute === 'separation' && shelf?.leavesAt
  const leaves = isForecast ? addDays(sheet.study.startedOn, Math.round(shelf.leavesAt!.weeks * 7)) : null
  return {
    number: flag.number,
    sentence: flag.sentence,
    strong: leaves ? `about ${spokenDay(leaves)}` : null,
    rowId: flag.studyStationId!,
    weeks: flag.atWeeks === null || !shelf ? flag.atWeeks : nearestCell(shelf, flag.atWeeks),
    href: `/flags/${flag.number}`,
    level: flag.level === 'out' ? 'out' : 'open',
  }
}

/** The picked cell's values as levels within their bands. */
export function stripOf(shelf: SheetShelf, weeks: number): StripAttribute[] {
  const cell = shelf.cells.find((one) => one.weeks === weeks)
  return (cell?.values ?? []).map(
    ({ attribute, text, isEstimate, isOut, band, lowerText, upperText, initial, last, now }) => ({
      key: attribute,
      name: isEstimate ? `${attributeName(attribute)}, an estimate` : attributeName(attribute),
      text,
      isOut,
      lower: band.lower,
      upper: band.upper,
      initial,
      last,
      now,
      ...(lowerText === null ? {} : { lowerText }),
      ...(upperText === null ? {} : { upperText }),
    }),
  )
}
