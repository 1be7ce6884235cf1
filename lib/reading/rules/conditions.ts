/** How a reading was come by; null where nothing is known of it. */
export type Conditions = {
  spindle: string | null
  rpm: number | null
  seconds: number | null
  path: Path | null
  restMinutes: number | null
  sampleTemperatureC: number | null
}

export const paths = ['fixed', 'descending'] as const
export type Path = (typeof paths)[number]

/** Further off than this from the initial's sample, a viscosity or a pH is another number [practice]. */
const temperatureToleranceC = 1

/** What an entry's detail says. */
export function conditionsIn(detail: Record<string, unknown>): Conditions {
  const number = (key: string) => (typeof detail[key] === 'number' ? detail[key] : null)
  return {
    spindle: typeof detail['spindle'] === 'string' ? detail['spindle'] : null,
    rpm: number('rpm'),
    seconds: number('seconds'),
    path: paths.find((path) => path === detail['path']) ?? null,
    restMinutes: number('restMinutes'),
    sampleTemperatureC: number('sampleTemperatureC'),
  }
}

/** What a method says as it is done: "T-bar D, 5 rpm, 30 s, descending, unstirred, at 25 °C". */
export function saidConditions(method: string): Conditions {
  const number = (pattern: RegExp) => {
    const [, found] = pattern.exec(method) ?? []
    return found === undefined ? null : Number(found.replace(',', '.'))
  }
  return {
    spindle: null,
    rpm: number(/(\d+(?:[.,]\d+)?) ?rpm\b/),
    seconds: number(/(\d+(?:[.,]\d+)?) ?s\b/),
    path: paths.find((path) => new RegExp(`\\b${path}\\b`).test(method)) ?? null,
    restMinutes: number(/\brests? (\d+(?:[.,]\d+)?) ?min/),
    sampleTemperatureC: number(/\bat (\d+(?:[.,]\d+)?) ?°C/),
  }
}

/** The initial's, as far as its entry says them, then what the protocol asks for. */
export function askedConditions(
  initial: Record<string, unknown> | null,
  planned: { method: string; viscosity?: { spindle: string; rpm: number } | null | undefined },
): Conditions {
  const torque = initial?.['torque']
  const sources = [
    conditionsIn(initial ?? {}),
    conditionsIn(torque && typeof torque === 'object' ? (torque as Record<string, unknown>) : {}),
    conditionsIn({ ...planned.viscosity }),
    saidConditions(typeof initial?.['method'] === 'string' ? initial['method'] : planned.method),
  ]
  const first = <K extends keyof Conditions>(key: K) =>
    (sources.find((source) => source[key] !== null)?.[key] ?? null) as Conditions[K]
  return {
    spindle: first('spindle'),
    rpm: first('rpm'),
    seconds: first('seconds'),
    path: first('path'),
    restMinutes: first('restMinutes'),
    sampleTemperatureC: first('sampleTemperatureC'),
  }
}

/** Readings compare only under the initial's conditions; null where they are those. */
export function changedConditions(used: Conditions, initial: Conditions): string | null {
  const differs = (key: keyof Conditions) =>
    used[key] !== null && initial[key] !== null && used[key] !== initial[key]
  const changed = [
    differs('spindle') ? `spindle ${used.spindle} instead of the initial's ${initial.spindle}` : '',
    differs('rpm') ? `${used.rpm} rpm instead of ${initial.rpm}` : '',
    differs('seconds') ? `${used.seconds} s instead of ${initial.seconds} s` : '',
    differs('path') ? `a ${used.path} spindle instead of a ${initial.path} one` : '',
    differs('restMinutes') ? `${used.restMinutes} min of rest instead of ${initial.restMinutes}` : '',
    differs('sampleTemperatureC') &&
    Math.abs(used.sampleTemperatureC! - initial.sampleTemperatureC!) > temperatureToleranceC
      ? `the sample at ${used.sampleTemperatureC} °C instead of ${initial.sampleTemperatureC} °C`
      : '',
  ].filter(Boolean)
  if (changed.length === 0) return null
  return `Measured with ${changed.join(' and ')}; such readings do not compare. Measure again as at the start.`
}
