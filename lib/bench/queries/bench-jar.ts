import { namedJar } from '@/lib/jar/rules/code'
import { standsAs } from '@/lib/protocol/rules/plan'
import type { Standing } from '@/lib/science/series'
import { fieldsOf, layersOf, worstStanding, type BenchField, type Layers, type Values } from '../rules'
import type { BenchJarRow } from './jars'

export type BenchJar = {
  pullJarId: string
  version: number
  jarId: string
  code: string
  /** As the label says it: "45·K7R2M". */
  name: string
  kind: 'watch' | 'measuring' | 'spare' | 'retain'
  asks: 'watch' | 'measuring' | 'repeat'
  state: 'due' | 'resting' | 'done' | 'missed'
  study: { id: string; code: string; title: string }
  batch: { id: string; code: string; formulaName: string; emulsionType: string; isReference: boolean }
  /** What sets it apart from an upright jar in the study's pack: "lying", "own pack: airless pump"; else empty. */
  standsAs: string
  timeWeeks: number
  /** "week 12", "cycle 3". */
  label: string
  dueOn: string
  windowFrom: string
  windowTo: string
  /** The window is over. */
  isOverdue: boolean
  isLastDay: boolean
  /** Empty and filled it was weighed, so its mass is read in grams, jar and all. */
  isWeighed: boolean
  shelf: number | null
  place: number | null
  openedBy: { personId: string; name: string; initials: string; at: string } | null
  restUntil: string | null
  /** Rested for the protocol's hours. */
  isReady: boolean
  restHours: number
  closedAt: string | null
  closedBy: { name: string; initials: string } | null
  missedReason: string | null
  /** Attributes of it that are on record while the jar is still open. */
  read: string[]
  /** The code of the jar whose place it takes in this pull. */
  standsInFor: string | null
  mishaps: BenchJarRow['mishaps']
  standing: Standing
  layers: Layers | null
  fields: BenchField[]
}

/** A row of the Bench from its row of the database. */
export function benchJar(row: BenchJarRow, values: Values, today: string, now: string): BenchJar {
  const series = values.series.filter(
    (s) => s.studyId === row.studyId && s.batchId === row.batchId && s.studyStationId === row.studyStationId,
  )
  return {
    pullJarId: row.pullJarId,
    version: row.version,
    jarId: row.jarId,
    code: row.code,
    name: namedJar(row.code, row),
    kind: row.kind as BenchJar['kind'],
    asks: row.asks as BenchJar['asks'],
    state: row.state as BenchJar['state'],
    study: { id: row.studyId, code: row.studyCode, title: row.studyTitle },
    batch: {
      id: row.batchId,
      code: row.batchCode,
      formulaName: row.formulaName,
      emulsionType: row.emulsionType,
      isReference: row.isReference,
    },
    standsAs: standsAs(row.variant, row.plan.ownPack),
    timeWeeks: row.timeWeeks,
    label: row.label,
    dueOn: row.dueOn,
    windowFrom: row.windowFrom,
    windowTo: row.windowTo,
    isOverdue: isToRead(row.state) && row.windowTo < today,
    isLastDay: isToRead(row.state) && row.windowTo === today,
    isWeighed: row.tareG !== null && row.grossG !== null,
    shelf: row.shelf,
    place: row.place,
    openedBy:
      row.openedBy && isToRead(row.state)
        ? { personId: row.openedBy, name: row.openerName!, initials: row.openerInitials!, at: row.openedAt! }
        : null,
    restUntil: row.restUntil,
    isReady: row.state === 'resting' && row.restUntil !== null && row.restUntil <= now,
    restHours: row.plan.restHours,
    closedAt: row.closedAt,
    closedBy: row.closerName ? { name: row.closerName, initials: row.closerInitials! } : null,
    missedReason: row.missedReason,
    read: row.read,
    standsInFor: row.standsInFor,
    mishaps: row.mishaps,
    standing: worstStanding(series.map((s) => s.standing)),
    layers: layersOf(values.readings, row),
    fields: fieldsOf(row, values),
  }
}

function isToRead(state: string): boolean {
  return state === 'due' || state === 'resting'
}
