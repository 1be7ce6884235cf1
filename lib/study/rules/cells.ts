import type { Mishap } from '@/lib/jar/rules/mishap'
import { hairlineText, type SeenLayers } from '@/lib/reading/rules/layers-words'
import { attributeOf, type Describing } from '@/lib/reading/schema/attributes'
import { isBeyondBand } from '@/lib/science/band'
import { mean } from '@/lib/science/mean'
import { separation } from '@/lib/science/separation'
import type { Band, SeriesFinding, Standing } from '@/lib/science/series'
import { shownValue, shownWithUnit } from './words'

export type Posture = 'upright' | 'leaning' | 'lying'
export type CellState = 'read' | 'due' | 'planned' | 'missed' | 'resting' | 'broken' | 'lost'

type PullJar = {
  pullId: string
  studyStationId: string
  batchId: string
  timeWeeks: number
  label: string
  dueOn: string
  windowFrom: string
  windowTo: string
  asks: string
  state: string
  jarState: string
  code: string
  mishaps?: Mishap[]
}
type Reading = {
  id: string
  batchId: string
  studyStationId: string | null
  pullId: string | null
  attribute: string
  value: number | null
  readBy: string
  detail: SeenLayers & { topMm?: number; bottomMm?: number; isEstimate?: boolean }
}
type Series = {
  batchId: string
  studyStationId: string
  attribute: string
  standing: Standing
  finding: SeriesFinding
}

/** One place of the sheet: what was read of the jars of one pull, and what it means. */
export type Cell = {
  weeks: number
  pullId: string | null
  pullLabel: string
  dueOn: string
  state: CellState
  /** What stands under the jar: the separation, or what is wanted. */
  label: string
  posture: Posture
  topPercent: number | null
  bottomPercent: number | null
  separationPercent: number | null
  /** Seen and too thin for the ruler: drawn as a hairline, and written as one. */
  isTrace: boolean
  /** Bleed on the wall, 0 to 4, and a cream layer in percent: beside the separation, not in it. */
  bleed: number
  creamPercent: number
  mishaps: Mishap[]
  code: string | null
  readBy: string | null
  values: CellValue[]
}

export type CellValue = {
  attribute: string
  text: string
  /** Told from a photo, and no measurement. */
  isEstimate: boolean
  isOut: boolean
  band: Band
  lowerText: string | null
  upperText: string | null
  initial: number | null
  last: number | null
  now: number | null
}

const worse: Standing[] = ['untold', 'steady', 'leaning', 'out']

/** The cells of one batch at one station, in time order; the initial is the first. */
export function cellsOf(
  batchId: string,
  stationId: string,
  input: Omit<Own, 'batchId' | 'stationId'> & { pullJars: PullJar[]; series: Series[] },
): Cell[] {
  const own = { batchId, stationId, ...input }
  const series = input.series.filter((one) => one.batchId === batchId && one.studyStationId === stationId)
  const pulls = new Map<string, PullJar[]>()
  for (const jar of input.pullJars) {
    if (jar.batchId !== batchId || jar.studyStationId !== stationId) continue
    pulls.set(jar.pullId, [...(pulls.get(jar.pullId) ?? []), jar])
  }
  const cells: Cell[] = [initialCell(own, series)]
  for (const jars of pulls.values()) cells.push(pullCell(jars, own, series, cells.at(-1)!))
  return cells
}

type Own = {
  batchId: string
  stationId: string
  readings: Reading[]
  today: string
  fillHeightMm: number
  /** Where attributes of the protocol's own are described. */
  plan: Describing
}

function initialCell(own: Own, series: Series[]): Cell {
  const initials = own.readings.filter((r) => r.batchId === own.batchId && r.studyStationId === null)
  return {
    weeks: 0,
    pullId: null,
    pullLabel: 'initial',
    dueOn: '',
    state: 'read',
    label: shownValue(attributeOf('separation'), 0),
    posture: 'upright',
    topPercent: 0,
    bottomPercent: 0,
    separationPercent: 0,
    ...nothingBeside,
    mishaps: [],
    code: null,
    readBy: initials[0]?.readBy ?? null,
    values: series.map(({ attribute, finding }) => ({
      ...valueOf(attribute, own.plan, finding, finding.initial),
      isEstimate: isEstimated(initials, attribute),
      initial: finding.initial,
      last: null,
    })),
  }
}

function pullCell(jars: PullJar[], own: Own, series: Series[], before: Cell): Cell {
  const [first] = jars as [PullJar]
  const readings = own.readings.filter(
    (reading) => reading.pullId === first.pullId && reading.batchId === own.batchId,
  )
  const state = stateOf(jars, readings, own.today)
  const watched = layersOf(readings, own.fillHeightMm)
  const values = series.map(({ attribute, finding }) => {
    const now = shownOf(readings, attribute)
    const text = attribute === 'separation' && watched ? watched.text : null
    const last = before.values.find((value) => value.attribute === attribute)
    return {
      ...valueOf(attribute, own.plan, finding, now),
      ...(text === null ? {} : { text }),
      isEstimate: isEstimated(readings, attribute),
      initial: finding.initial,
      last: last?.now ?? last?.last ?? null,
    }
  })
  return {
    weeks: first.timeWeeks,
    pullId: first.pullId,
    pullLabel: first.label,
    dueOn: first.dueOn,
    state,
    label: labelOf(state, watched, first, own.today),
    posture: postureOf(series, new Set(readings.map((reading) => reading.id))),
    topPercent: watched?.topPercent ?? null,
    bottomPercent: watched?.bottomPercent ?? null,
    separationPercent: watched?.separationPercent ?? null,
    ...(watched?.beside ?? nothingBeside),
    mishaps: jars.flatMap((jar) => jar.mishaps ?? []),
    code: first.code,
    readBy: readings.at(-1)?.readBy ?? null,
    values,
  }
}

function stateOf(jars: PullJar[], readings: Reading[], today: string): CellState {
  if (readings.length > 0 || jars.some((jar) => jar.state === 'done')) return 'read'
  if (jars.some((jar) => jar.state === 'resting')) return 'resting'
  if (jars.every((jar) => jar.state === 'missed')) {
    if (!jars.every((jar) => jar.jarState === 'lost')) return 'missed'
    const isLost = jars.some((jar) => jar.mishaps?.at(-1)?.kind === 'lost')
    return isLost ? 'lost' : 'broken'
  }
  return jars[0]!.windowFrom <= today ? 'due' : 'planned'
}

function labelOf(state: CellState, seen: Seen | null, pull: PullJar, today: string): string {
  if (state === 'read') {
    if (seen === null) return ''
    return seen.beside.isTrace ? 'trace' : shownValue(attributeOf('separation'), seen.separationPercent)
  }
  if (state === 'due') return pull.windowTo < today ? 'late' : 'due'
  return state === 'planned' ? '' : state
}

const nothingBeside = { isTrace: false, bleed: 0, creamPercent: 0 }

type Seen = {
  topPercent: number
  bottomPercent: number
  separationPercent: number
  /** In place of the number, where it is none. */
  text: string | null
  beside: typeof nothingBeside
}

/** Several jars of one pull: the worst counts, and its layers are the ones drawn. */
function layersOf(readings: Reading[], fillHeightMm: number): Seen | null {
  const layers = readings
    .filter((reading) => reading.attribute === 'separation' && reading.value !== null)
    .map(({ value, detail }) => {
      const { topMm = 0, bottomMm, totalMm = fillHeightMm } = detail
      const { topPercent, bottomPercent } = separation({ totalMm, topMm, bottomMm: bottomMm ?? 0 })
      return {
        topPercent,
        // What was only typed in percent lies below, as water does in most that come apart.
        bottomPercent: bottomMm === undefined ? Math.max(0, value! - topPercent) : bottomPercent,
        separationPercent: value!,
        text: hairlineText(detail),
        beside: {
          isTrace: detail.isUnderRuler ?? false,
          bleed: detail.bleed ?? 0,
          creamPercent: detail.creamPercent ?? 0,
        },
      }
    })
  return layers.toSorted((a, b) => b.separationPercent - a.separationPercent)[0] ?? null
}

/** The worst of what the series were judged at on this pull. */
function postureOf(series: Series[], readingIds: Set<string>): Posture {
  const standings = series.flatMap(({ finding }) =>
    finding.points
      .filter((point) => point.readingIds.some((id) => readingIds.has(id)))
      .map((point) => point.standing),
  )
  const worst = worstOf(standings)
  return worst === 'out' ? 'lying' : worst === 'leaning' ? 'leaning' : 'upright'
}

/** Untold only where nothing else is told. */
export function worstOf(standings: Standing[]): Standing {
  return standings.reduce<Standing>(
    (worst, one) => (worse.indexOf(one) > worse.indexOf(worst) ? one : worst),
    'untold',
  )
}

function valueOf(key: string, plan: Describing, finding: SeriesFinding, now: number | null) {
  const attribute = attributeOf(key, plan)
  const edge = (value: number | null) => (value === null ? null : shownValue(attribute, value))
  return {
    attribute: key,
    text: now === null ? 'not read' : shownWithUnit(attribute, now),
    lowerText: edge(finding.band.lower),
    upperText: edge(finding.band.upper),
    isOut: now !== null && isBeyondBand(finding.band, now),
    band: finding.band,
    now,
  }
}

function isEstimated(readings: Reading[], attribute: string): boolean {
  return readings.some((reading) => reading.attribute === attribute && reading.detail.isEstimate === true)
}

function shownOf(readings: Reading[], attribute: string): number | null {
  const values = readings
    .filter((reading) => reading.attribute === attribute && reading.value !== null)
    .map((reading) => reading.value!)
  if (values.length === 0) return null
  if (attribute === 'separation') return Math.max(...values)
  return mean(values)
}
