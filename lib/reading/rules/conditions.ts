export const paths = ['fixed', 'descending'] as const
export type Path = (typeof paths)[number]

/** How an emulsion is brought to the electrode; values by two of them never compare. */
export const phMethods = ['direct', 'extract', 'water phase', 'broken emulsion'] as const
export type PhMethod = (typeof phMethods)[number]

/** How a reading was come by; null where nothing is known of it. */
export type Conditions = {
  spring: string | null
  spindle: string | null
  rpm: number | null
  seconds: number | null
  path: Path | null
  restMinutes: number | null
  sampleTemperatureC: number | null
  phMethod: PhMethod | null
  extractParts: number | null
  extractMinutes: number | null
  /** A colour by an instrument, or told from a photo. */
  colourBy: ColourBy | null
}
type ColourBy = 'measured' | 'estimate'
export type ConditionKey = keyof Conditions

/** What is asked about each attribute whose readings compare only under the same conditions. */
const keysOf: Record<string, readonly ConditionKey[]> = {
  viscosity: ['spring', 'spindle', 'rpm', 'seconds', 'path', 'restMinutes', 'sampleTemperatureC'],
  ph: ['phMethod', 'extractParts', 'extractMinutes', 'sampleTemperatureC'],
}

export function conditionKeys(attribute: string): readonly ConditionKey[] {
  return keysOf[attribute] ?? []
}

/** Further off than this from the initial's sample, a viscosity or a pH is another number [practice]. */
const temperatureToleranceC = 1

/** What a plan, an initial's or an entry's detail says. */
export function conditionsIn(detail: Record<string, unknown>): Conditions {
  const number = (key: string) => (typeof detail[key] === 'number' ? detail[key] : null)
  const text = (key: string) => (typeof detail[key] === 'string' ? detail[key] || null : null)
  return {
    spring: text('spring'),
    spindle: text('spindle'),
    rpm: number('rpm'),
    seconds: number('seconds'),
    path: paths.find((path) => path === detail['path']) ?? null,
    restMinutes: number('restMinutes'),
    sampleTemperatureC: number('sampleTemperatureC'),
    phMethod: phMethods.find((method) => method === detail['phMethod']) ?? null,
    extractParts: number('extractParts'),
    extractMinutes: number('extractMinutes'),
    colourBy: detail['lab'] ? (detail['isEstimate'] ? 'estimate' : 'measured') : null,
  }
}

type Planned = {
  viscosity?: { spindle: string; rpm: number } | null | undefined
  conditions?: Record<string, unknown> | undefined
}

/** What the protocol asks for. */
export function plannedConditions({ viscosity, conditions }: Planned): Conditions {
  return conditionsIn({ ...conditions, ...viscosity })
}

/** The initial's, as far as its entry says them, then what the protocol asks for. */
export function askedConditions(initial: Record<string, unknown> | null, planned: Planned): Conditions {
  const torque = initial?.['torque']
  const sources = [
    conditionsIn(initial ?? {}),
    conditionsIn(torque && typeof torque === 'object' ? (torque as Record<string, unknown>) : {}),
    plannedConditions(planned),
  ]
  const keys = Object.keys(sources[0]!) as ConditionKey[]
  const first = (key: ConditionKey) => sources.find((source) => source[key] !== null)?.[key] ?? null
  return Object.fromEntries(keys.map((key) => [key, first(key)])) as Conditions
}

/** As one says them: "T-bar D, 5 rpm, after 30 s, descending, at 25 °C"; "extract 1 to 10 in water, 30 min". */
export function conditionWords(said: Partial<Record<ConditionKey, unknown>>): string {
  const { spring, spindle, rpm, seconds, path, restMinutes, sampleTemperatureC, ...ph } = conditionsIn(said)
  const { phMethod, extractParts, extractMinutes } = ph
  return [
    phMethod === 'extract' && extractParts !== null ? `extract 1 to ${extractParts} in water` : phMethod,
    extractMinutes === null ? null : `${extractMinutes} min`,
    spring === null ? null : `spring ${spring}`,
    spindle,
    rpm === null ? null : `${rpm} rpm`,
    seconds === null ? null : `after ${seconds} s`,
    path,
    restMinutes === null ? null : `rested ${restMinutes} min`,
    sampleTemperatureC === null ? null : `at ${String(sampleTemperatureC).replace('-', '−')} °C`,
  ]
    .filter(Boolean)
    .join(', ')
}

/** How an attribute is measured: what the plan's fields say, then what its words add. */
export function methodText(planned: Planned & { method: string }): string {
  return [conditionWords(plannedConditions(planned)), planned.method].filter(Boolean).join(', ')
}

/** Readings compare only under the initial's conditions; null where they are those. */
export function changedConditions(used: Conditions, initial: Conditions): string | null {
  const differs = (key: ConditionKey) =>
    used[key] !== null && initial[key] !== null && used[key] !== initial[key]
  const changed = [
    differs('phMethod') ? `${methodWords[used.phMethod!]} instead of ${methodWords[initial.phMethod!]}` : '',
    differs('extractParts')
      ? `an extract 1 to ${used.extractParts} instead of 1 to ${initial.extractParts}`
      : '',
    differs('extractMinutes')
      ? `an extract of ${used.extractMinutes} min instead of ${initial.extractMinutes}`
      : '',
    differs('spring') ? `spring ${used.spring} instead of ${initial.spring}` : '',
    differs('spindle') ? `spindle ${used.spindle} instead of the initial's ${initial.spindle}` : '',
    differs('rpm') ? `${used.rpm} rpm instead of ${initial.rpm}` : '',
    differs('seconds') ? `${used.seconds} s instead of ${initial.seconds} s` : '',
    differs('path') ? `a ${used.path} spindle instead of a ${initial.path} one` : '',
    differs('restMinutes') ? `${used.restMinutes} min of rest instead of ${initial.restMinutes}` : '',
    differs('sampleTemperatureC') &&
    Math.abs(used.sampleTemperatureC! - initial.sampleTemperatureC!) > temperatureToleranceC
      ? `the sample at ${used.sampleTemperatureC} °C instead of ${initial.sampleTemperatureC} °C`
      : '',
    differs('colourBy') ? colourWords[used.colourBy!] : '',
  ].filter(Boolean)
  if (changed.length === 0) return null
  return `Measured with ${changed.join(' and ')}; such readings do not compare. Measure again as at the start.`
}

const colourWords: Record<ColourBy, string> = {
  estimate: 'an estimate of the colour instead of a colour instrument',
  measured: 'a colour instrument instead of an estimate of the colour',
}

const methodWords: Record<PhMethod, string> = {
  direct: 'the electrode dipped',
  extract: 'an extract',
  'water phase': 'the water phase alone',
  'broken emulsion': 'the broken emulsion',
}
