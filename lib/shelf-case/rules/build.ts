import { extrapolationCap } from '@/lib/science/extrapolation-cap'
import { nominalMonths, weeksSince } from '@/lib/science/months'
import type { SeriesPoint } from '@/lib/science/series'
import { protocolPlan } from '@/lib/protocol/schema'
import type { CaseProposal } from '@/lib/shelf-case/schema'
import { attributeEvidence, type BatchSeries } from '@/lib/shelf-case/rules/attribute'
import type { AttributeEvidence, CaseContent, ReadingEvidence } from '@/lib/shelf-case/rules/content'
import { rowsOf, shelvesOf } from '@/lib/shelf-case/rules/shelves'
import { temperatureRecord } from '@/lib/shelf-case/rules/temperature'
import { weaknesses } from '@/lib/shelf-case/rules/weakness'
import type { Evidence, Stay } from '@/lib/shelf-case/queries/evidence'

export type Computed = Omit<CaseContent, 'case' | 'proposal' | 'putForward' | 'isInvented'>

/** The station that a case speaks for: the warmest that decides at 15 to 30 °C, unless one is named. */
export function caseStation(evidence: Evidence, studyStationId: string | null) {
  if (studyStationId) return evidence.stations.find((s) => s.id === studyStationId) ?? null
  const candidates = evidence.stations.filter(
    (s) =>
      s.voice === 'decides' &&
      !s.isFreezeThaw &&
      (s.temperatureC ?? 99) >= 15 &&
      (s.temperatureC ?? 99) <= 30,
  )
  return candidates.sort((a, b) => (b.temperatureC ?? 0) - (a.temperatureC ?? 0))[0] ?? null
}

/** What the evidence supports at one station: pure, so that the page and the freezing give the same figures. */
export function computeCase(
  evidence: Evidence,
  station: Evidence['stations'][number],
  stays: Stay[],
): Computed {
  const plan = protocolPlan.parse(evidence.study.plan)
  const weeksOf = (iso: string) => weeksSince(evidence.study.startedAt, iso)
  const superseded = new Set(evidence.readings.flatMap((r) => (r.supersedesId ? [r.supersedesId] : [])))
  const standing = evidence.readings.filter((r) => !r.isVoid && !superseded.has(r.id))
  const atStation = evidence.series.filter((s) => s.studyStationId === station.id)
  const dataMonths = reachedMonths(
    evidence.batches.map((b) => atStation.filter((s) => s.batchId === b.id).flatMap((s) => s.finding.points)),
  )
  const cap = capOf(evidence, station, dataMonths)
  const batchSeries = (attribute: string): BatchSeries[] =>
    evidence.batches.flatMap((b) => {
      const found = atStation.find((s) => s.batchId === b.id && s.attribute === attribute)
      if (!found) return []
      const counted = new Set(found.finding.points.flatMap((p) => rowsOf(found, p.countedIds)))
      return {
        batch: b.code,
        input: found.input,
        finding: found.finding,
        observations: standing
          .filter(
            (r) =>
              r.batchId === b.id &&
              r.attribute === attribute &&
              r.value !== null &&
              (r.studyStationId === null || (r.studyStationId === station.id && counted.has(r.id))),
          )
          .map((r) => ({
            weeks: r.studyStationId === null ? 0 : weeksOf(r.measuredAt),
            value: r.value ?? 0,
          })),
      }
    })
  const attributes = plan.attributes
    .map((planned) => ({ planned, series: batchSeries(planned.attribute) }))
    .filter(({ series }) => series.length > 0)
    .map(({ planned, series }) => attributeEvidence(planned, series, cap.output.capMonths))
    // What statistics carry first, then what was only seen to pass.
    .toSorted((a, b) => Number(b.basis === 'regression') - Number(a.basis === 'regression'))
  const limiting = limitingOf(attributes)
  const record = temperatureRecord(stays)
  const missing = evidence.missed.map((m) => ({
    jar: m.jar,
    station: evidence.stations.find((s) => s.id === m.studyStationId)?.name ?? '',
    label: m.label,
    reason: m.missedReason ?? '',
  }))
  const lastRead = standing.at(-1)?.measuredAt ?? evidence.study.startedAt
  return {
    format: 'stillstand-case-2',
    lab: { name: evidence.lab.name, timeZone: evidence.lab.timeZone },
    study: {
      code: evidence.study.code,
      title: evidence.study.title,
      startedOn: evidence.study.startedOn,
      lastReadOn: lastRead.slice(0, 10),
      endWeeks: evidence.study.endWeeks,
    },
    batches: evidence.batches.map((b) => ({
      code: b.code,
      formula: `${b.formulaName}, version ${b.number}`,
      emulsionType: b.emulsionType,
      madeOn: b.madeAt?.slice(0, 10) ?? null,
    })),
    station: {
      name: station.name,
      temperatureC: station.temperatureC ?? 0,
      voice: station.voice,
      timePointsMonths: timePointsOf(plan, station).map(nominalMonths),
    },
    supportedMonths: limiting?.supportedMonths ?? 0,
    limitingAttribute: limiting?.attribute ?? null,
    dataMonths,
    cap,
    attributes,
    shelves: shelvesOf(evidence),
    temperatureRecord: record,
    weakens: weaknesses({
      batches: evidence.batches,
      flags: evidence.flags,
      amendments: evidence.amendments,
      moves: evidence.moves,
      stations: evidence.stations,
      station,
      attributes,
      record,
      missing,
      ...outsideOf(evidence),
      dataMonths,
    }),
    missing,
    ...outsideOf(evidence),
    readings: readingTable(evidence, superseded, weeksOf),
  }
}

function outsideOf({ outside }: Evidence): Pick<CaseContent, 'outside'> {
  const standing = outside.filter((one) => !one.isSuperseded)
  if (standing.length === 0) return {}
  return {
    outside: standing.map((one) => ({
      ...{ what: one.what, test: one.test, batch: one.batch, weeks: one.timeWeeks, outcome: one.outcome },
      ...{ value: one.value, labName: one.labName, reportNumber: one.reportNumber },
      ...{ reportedOn: one.reportedOn, by: one.initials, sha256: one.sha256 },
    })),
  }
}

/** Months to which every batch was read at the station: the least of their latest counted times. */
export function reachedMonths(batches: Pick<SeriesPoint, 'counted' | 'time'>[][]): number {
  return Math.min(
    ...batches.map((points) =>
      Math.max(0, ...points.filter((p) => p.counted).map((p) => nominalMonths(p.time))),
    ),
  )
}

/** The attribute that supports the least; the first of several. */
export function limitingOf<T extends Pick<AttributeEvidence, 'supportedMonths'>>(attributes: T[]): T | null {
  return attributes.reduce<T | null>(
    (least, a) => (least === null || a.supportedMonths < least.supportedMonths ? a : least),
    null,
  )
}

function timePointsOf(plan: ReturnType<typeof protocolPlan.parse>, station: Evidence['stations'][number]) {
  const planned = plan.stations.find(
    (s) => (s.kind === 'freeze-thaw') === station.isFreezeThaw && s.temperatureC === station.temperatureC,
  )
  return [0, ...(planned?.timePoints ?? [])]
}

/**
 * The cap of ICH Q1E's decision tree. Significant change at accelerated counts as shown absent only after six
 * months of it without a series out [std: ICH Q1A(R2)]; anything less is taken as change, which allows less.
 */
function capOf(evidence: Evidence, station: Evidence['stations'][number], dataMonths: number) {
  const isUnchanged = (low: number, high: number) => {
    const there = evidence.stations.filter(
      (s) =>
        !s.isFreezeThaw &&
        s.id !== station.id &&
        (s.temperatureC ?? -99) >= low &&
        (s.temperatureC ?? -99) <= high,
    )
    return there.some((s) => {
      const series = evidence.series.filter((x) => x.studyStationId === s.id)
      const months = Math.max(0, ...series.flatMap((x) => x.finding.points.map((p) => nominalMonths(p.time))))
      return months >= 6 && series.every((x) => x.finding.standing !== 'out')
    })
  }
  const acceleratedChange = !isUnchanged(38, 42)
  const intermediateChange = !isUnchanged(28, 32)
  const t = station.temperatureC ?? 25
  const input: Parameters<typeof extrapolationCap>[0] = {
    dataMonths,
    storage: t < 0 ? 'frozen' : t <= 8 ? 'refrigerated' : 'room',
    acceleratedChange,
    intermediateChange,
    variable: true,
    statistics: true,
  }
  const why = acceleratedChange
    ? 'Six months at 40 °C without significant change are not shown.'
    : 'Six months at 40 °C without significant change.'
  return { topic: 'extrapolation-cap' as const, input, output: extrapolationCap(input), why }
}

function readingTable(
  evidence: Evidence,
  superseded: Set<string>,
  weeksOf: (iso: string) => number,
): ReadingEvidence[] {
  const uncounted = new Set(
    evidence.series.flatMap((s) =>
      s.finding.points.flatMap((p) =>
        rowsOf(
          s,
          p.readingIds.filter((id) => !p.countedIds.includes(id)),
        ),
      ),
    ),
  )
  return evidence.readings.map((r) => ({
    batch: evidence.batches.find((b) => b.id === r.batchId)?.code ?? '',
    station: evidence.stations.find((s) => s.id === r.studyStationId)?.name ?? 'initial',
    jar: r.jar ?? '',
    weeks: r.studyStationId === null ? 0 : weeksOf(r.measuredAt),
    attribute: r.attribute,
    replicate: r.replicate,
    typed: r.typed,
    value: r.value,
    word: r.word,
    measuredAt: r.measuredAt,
    recordedAt: r.recordedAt,
    by: r.by,
    state: superseded.has(r.id)
      ? 'superseded'
      : r.isVoid
        ? 'void'
        : uncounted.has(r.id)
          ? 'does not count'
          : 'counts',
    reason: r.reason,
  }))
}

/** The frozen content: what was computed, what is proposed, and who puts it forward. */
export function freeze(
  computed: Computed,
  code: string,
  proposal: CaseProposal,
  { isInvented, ...putForward }: CaseContent['putForward'] & { isInvented: boolean },
): CaseContent {
  return {
    ...computed,
    case: { code, kind: proposal.kind },
    proposal: {
      months: proposal.proposedMonths,
      storageStatement: proposal.storageStatement,
      whyFewer: proposal.whyFewer,
      provisionalRule: proposal.provisionalRule,
      reviewOn: proposal.reviewOn,
      periodAfterOpeningMonths: proposal.periodAfterOpeningMonths,
      periodAfterOpeningEvidence: proposal.periodAfterOpeningEvidence,
    },
    putForward,
    isInvented,
  }
}
