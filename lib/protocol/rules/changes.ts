import type { PlannedAttribute, PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { attributeName } from '@/lib/reading/schema/attributes'
import { askedAt, stationName } from './plan'
import { conditionWords, conditionsIn } from '@/lib/reading/rules/conditions'
import { cycleText, dropletMeasureWords, toleranceText } from './words'

/** What differs between two plans, one sentence a difference, in the order of the plan's own page. */
export function planChanges(before: ProtocolPlan, after: ProtocolPlan): string[] {
  return [
    ...stationChanges(before, after),
    ...attributeChanges(before, after),
    ...wholeChanges(before, after),
  ]
}

function stationChanges(before: ProtocolPlan, after: ProtocolPlan): string[] {
  const old = named(before)
  const now = named(after)
  const gone = [...old.keys()].filter((name) => !now.has(name)).map((name) => `${name} is taken out.`)
  const changed = [...now].flatMap(([name, station]) => {
    const was = old.get(name)
    if (!was) return [`${name} is new: ${weeksText(station.timePoints)}, ${station.voice}.`]
    return oneStation(name, was, station, before, after)
  })
  return [...gone, ...changed]
}

function oneStation(
  name: string,
  was: PlannedStation,
  is: PlannedStation,
  before: ProtocolPlan,
  after: ProtocolPlan,
): string[] {
  const added = is.timePoints.filter((week) => !was.timePoints.includes(week))
  const removed = was.timePoints.filter((week) => !is.timePoints.includes(week))
  const both = is.timePoints.filter((week) => was.timePoints.includes(week))
  const cells = after.attributes
    .filter(({ attribute }) => before.attributes.some((one) => one.attribute === attribute))
    .flatMap(({ attribute }) => {
      const reads = (plan: ProtocolPlan, station: PlannedStation, week: number) =>
        askedAt(plan, station, week).some((one) => one.attribute === attribute)
      const dropped = both.filter((week) => reads(before, was, week) && !reads(after, is, week))
      const taken = both.filter((week) => !reads(before, was, week) && reads(after, is, week))
      const label = attributeName(attribute)
      return [
        ...(dropped.length > 0 ? [`${name}: ${label} is no longer read in ${weeksText(dropped)}.`] : []),
        ...(taken.length > 0 ? [`${name}: ${label} is also read in ${weeksText(taken)}.`] : []),
      ]
    })
  return [
    ...(added.length > 0 ? [`${name}: ${weeksText(added)} added.`] : []),
    ...(removed.length > 0 ? [`${name}: ${weeksText(removed)} taken out.`] : []),
    ...turned(`${name}: voice`, was.voice, is.voice),
    ...turned(`${name}: window in days`, was.windowDays, is.windowDays),
    ...turned(`${name}: watch jars`, was.watchJars, is.watchJars),
    ...turned(`${name}: measuring jars a pull`, was.measuringJarsPerPull, is.measuringJarsPerPull),
    ...turned(`${name}: spares`, was.spares, is.spares),
    ...turned(`${name}: cycle`, was.cycle && cycleText(was.cycle), is.cycle && cycleText(is.cycle)),
    ...cells,
  ]
}

function attributeChanges(before: ProtocolPlan, after: ProtocolPlan): string[] {
  const find = (plan: ProtocolPlan, key: string) => plan.attributes.find((one) => one.attribute === key)
  const gone = before.attributes
    .filter(({ attribute }) => !find(after, attribute))
    .map(({ attribute }) => `${attributeName(attribute)} is no longer measured.`)
  const changed = after.attributes.flatMap((planned) => {
    const label = attributeName(planned.attribute)
    const was = find(before, planned.attribute)
    if (!was) return [`${label} is measured: ${toleranceText(planned)}.`]
    return [
      ...turned(`${label}: tolerance`, toleranceText(was), toleranceText(planned)),
      ...turned(`${label}: replicates`, was.replicates, planned.replicates),
      ...turned(`${label}: method`, was.method, planned.method),
      ...turned(`${label}: spindle`, spindleText(was), spindleText(planned)),
      ...turned(`${label}: conditions`, conditionsText(was), conditionsText(planned)),
    ]
  })
  return [...gone, ...changed]
}

function wholeChanges(before: ProtocolPlan, after: ProtocolPlan): string[] {
  const weighing = ({ weighingTolerancePercent: percent }: ProtocolPlan) =>
    percent === undefined ? undefined : `${percent} %`
  const outside = ({ setAside = [] }: ProtocolPlan) =>
    setAside.map(({ what, jars }) => `${jars} for ${what}`).join(', ')
  const names = ({ matrixing }: ProtocolPlan) =>
    matrixing?.attributes.map((key) => attributeName(key)).join(', ')
  const brackets = ({ bracketing }: ProtocolPlan) =>
    bracketing && `${bracketing.factor}, ${bracketing.low} and ${bracketing.high}`
  return [
    ...turned('End', `week ${before.endWeeks}`, `week ${after.endWeeks}`),
    ...turned('Fill', `${before.fillG} g`, `${after.fillG} g`),
    ...turned('Fill height', `${before.fillHeightMm} mm`, `${after.fillHeightMm} mm`),
    ...turned('Loss', `${before.lossPercent} %`, `${after.lossPercent} %`),
    ...turned('Weighing tolerance', weighing(before), weighing(after)),
    ...turned('Rest', `${before.restHours} h`, `${after.restHours} h`),
    ...turned('Initial jars', before.initialJars, after.initialJars),
    ...turned('Retains', before.retains, after.retains),
    ...turned('Set aside for outside laboratories', outside(before), outside(after)),
    ...turned('Pack', before.pack, after.pack),
    ...turned('Own pack', before.ownPack, after.ownPack),
    ...turned('Matrixed', names(before), names(after)),
    ...turned('Batches measured at a middle time point', before.batchMatrixing, after.batchMatrixing),
    ...turned('Bracketed', brackets(before), brackets(after)),
  ]
}

/** Stations of one name are told apart by their order. */
function named({ stations }: ProtocolPlan): Map<string, PlannedStation> {
  const found = new Map<string, PlannedStation>()
  stations.forEach((station, index) => {
    const name = stationName(station, index)
    const same = [...found.keys()].filter((one) => one === name || one.startsWith(`${name} (`)).length
    found.set(same === 0 ? name : `${name} (${same + 1})`, station)
  })
  return found
}

function turned(what: string, was: string | number | undefined, is: string | number | undefined): string[] {
  if (was === is) return []
  const shown = (value: string | number | undefined) =>
    value === undefined || value === '' ? 'nothing' : value
  return [`${what}: ${shown(was)}, now ${shown(is)}.`]
}

function weeksText(weeks: number[]): string {
  if (weeks.length === 0) return 'no time point'
  return `${weeks.length === 1 ? 'week' : 'weeks'} ${weeks.join(', ')}`
}

function spindleText({ viscosity }: PlannedAttribute): string | undefined {
  return viscosity && `${viscosity.spindle}, ${viscosity.rpm} rpm, constant ${viscosity.spindleConstant}`
}

/** What belongs to one attribute alone, in the order in which the editor asks it. */
function conditionsText({
  own,
  rulerMm,
  dropletMeasure,
  centrifuge,
  conditions,
  isInitialOnly,
}: PlannedAttribute): string {
  return [
    conditionWords(conditionsIn({ ...conditions })),
    own?.kind === 'scale' ? own.words.join(', ') : '',
    own?.kind === 'number' ? `${own.lower} to ${own.upper} ${own.unit}, ${own.decimals} decimals`.trim() : '',
    own ? `${own.jar} jar` : '',
    rulerMm === undefined ? '' : `the ruler tells ${rulerMm} mm`,
    dropletMeasure ? dropletMeasureWords[dropletMeasure] : '',
    centrifuge ? `${centrifuge.rpm} rpm at ${centrifuge.radiusMm} mm for ${centrifuge.minutes} minutes` : '',
    isInitialOnly ? 'only once, before the start' : '',
  ]
    .filter(Boolean)
    .join('; ')
}
