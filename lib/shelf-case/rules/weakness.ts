import { dayText } from '@/lib/report/rules'
import { degrees } from '@/lib/study/rules/finding'
import type {
  AttributeEvidence,
  CaseContent,
  TemperatureRecord,
  Weakness,
} from '@/lib/shelf-case/rules/content'
import type { Evidence } from '@/lib/shelf-case/queries/evidence'

/** What a reviewer has to weigh, worst first: doubts that stand, then those answered, then what is missing. */
export function weaknesses(from: {
  batches: unknown[]
  flags: Evidence['flags']
  amendments: Evidence['amendments']
  moves: Evidence['moves']
  stations: Pick<Evidence['stations'][number], 'id' | 'temperatureC' | 'isFreezeThaw' | 'name'>[]
  station: { name: string }
  attributes: AttributeEvidence[]
  record: TemperatureRecord | null
  missing: CaseContent['missing']
  outside?: CaseContent['outside']
  dataMonths: number
}): Weakness[] {
  const stands: Weakness[] = []
  for (const a of from.attributes) {
    const slopes = a.calc?.output.tests?.find((t) => t.name === 'slopes')
    if (slopes && !slopes.pooled)
      stands.push({
        state: 'stands',
        title: `Batches differ in ${a.label === 'pH' ? 'pH' : a.label.toLowerCase()}`,
        text: `Slopes p ${slopes.p === null ? 'not known' : slopes.p.toFixed(3)}, under 0.25: no pooling, and ${a.decidedBy ?? 'the worst batch'} decides alone.`,
        by: null,
      })
  }
  const least = Math.min(...from.attributes.map((a) => a.supportedMonths))
  const beyond = from.attributes.filter((a) => a.supportedMonths > from.dataMonths)
  if (from.attributes.length > 0 && least > from.dataMonths)
    stands.push({
      state: 'stands',
      title: 'Some months may lie past the data',
      text: `The data end at month ${Math.floor(from.dataMonths)}; ${beyond.map((a) => a.label).join(', ')} ${beyond.length === 1 ? 'is' : 'are'} carried on by a line.`,
      by: null,
    })
  if (from.batches.length < 3)
    stands.push({
      state: 'stands',
      title: from.batches.length === 1 ? 'One batch only' : 'Two batches only',
      text: 'Batches may differ more than this study can show. Three are usual for a date [practice].',
      by: null,
    })
  if (from.record === null)
    stands.push({
      state: 'stands',
      title: `No temperature record of ${from.station.name}`,
      text: 'Nothing shows at what temperature the jars stood.',
      by: null,
    })
  for (const x of from.record?.excursions ?? [])
    stands.push({
      state: 'stands',
      title: `${capital(from.station.name)} left its limits`,
      text: `${Math.round(x.hours)} h from ${dayText(x.from)}, ${x.worstC.toFixed(1)} °C at the worst. Mean kinetic temperature does not excuse it.`,
      by: null,
    })
  for (const x of (from.outside ?? []).filter((one) => one.outcome !== 'pass'))
    stands.push({
      state: 'stands',
      title: `${capital(x.what)} ${x.outcome === 'fail' ? 'failed' : 'was not judged'} at ${x.labName}`,
      text: `${x.test}, report ${x.reportNumber} of ${dayText(x.reportedOn)}${x.value ? `: ${x.value}` : ''}. What it means for the product is the safety assessor's to say.`,
      by: null,
    })
  for (const f of from.flags.filter((f) => f.state === 'open'))
    stands.push({ state: 'stands', title: `Flag ${f.number} is open`, text: f.sentence, by: null })
  const answered = from.flags
    .filter((f) => f.state !== 'open')
    .map((f): Weakness => ({
      state: 'answered',
      title: `Flag ${f.number}`,
      text: [f.sentence, f.why].filter(Boolean).join(' '),
      by: f.answeredBy && f.answeredAt ? `${f.answeredBy}, ${dayText(f.answeredAt)}` : null,
    }))
  const amended = from.amendments.map((a): Weakness => ({
    // What the protocol asked for and nobody has measured is missing, however well the rest was.
    state: a.kind === 'not started' ? 'missing' : 'answered',
    title:
      a.kind === 'not started'
        ? 'Part of the protocol not started'
        : `Amendment ${a.number} while the study ran`,
    text: `${a.sentence} ${a.reason}`,
    by: `${a.madeBy}, ${dayText(a.madeAt)}`,
  }))
  const moved = from.moves.map((m): Weakness => ({
    state: 'answered',
    title: `${m.jars} ${m.jars === 1 ? 'jar' : 'jars'} moved to ${m.toName}`,
    text: `${seriesName(from.stations.find((one) => one.id === m.studyStationId))}, from ${m.fromName}. ${m.reason}`,
    by: `${m.movedBy}, ${dayText(m.movedAt)}`,
  }))
  const missing = from.missing.map((m): Weakness => ({
    state: 'missing',
    title: `${m.jar}, ${m.label}: not read`,
    text: m.reason,
    by: null,
  }))
  const [left, done] = [amended.filter(isMissing), amended.filter((one) => !isMissing(one))]
  return [...stands, ...answered, ...done, ...moved, ...left, ...missing]
}

function isMissing({ state }: Weakness): boolean {
  return state === 'missing'
}

function seriesName(
  station: { temperatureC: number | null; isFreezeThaw: boolean; name: string } | undefined,
) {
  if (station?.isFreezeThaw) return 'Freeze-thaw'
  return station?.temperatureC == null ? capital(station?.name ?? '') : degrees(station.temperatureC)
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
