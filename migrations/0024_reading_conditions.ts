import { sql, type Kysely } from 'kysely'

/**
 * Under which pH and viscosity are read is said in fields of a plan, no longer in the words of its method. What the
 * words of protocols and running studies held is carried over, and the words that say nothing more are taken out.
 */
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    select set_config('app.actor_id', '00000000-0000-7000-8000-000000000001', true),
      set_config('app.reason', 'Carried over when conditions of pH and viscosity became fields of the plan', true),
      set_config('app.request_id', 'migration 0024', true)
  `.execute(db)
  for (const table of ['protocol_version', 'study']) {
    const { rows } = await sql<{ id: string; plan: Plan }>`select id, plan from ${sql.table(table)}`.execute(
      db,
    )
    for (const { id, plan } of rows) {
      const attributes = plan.attributes.map(carriedOver)
      if (attributes.every((one, index) => one === plan.attributes[index])) continue
      await sql`update ${sql.table(table)} set plan = ${JSON.stringify({ ...plan, attributes })}::jsonb,
        version = version + 1 where id = ${id}`.execute(db)
    }
  }
}

type Plan = { attributes: Planned[] }
type Planned = {
  attribute: string
  method: string
  viscosity?: { spindle: string; rpm: number }
  conditions?: Record<string, number | string>
}
type Said = Record<string, number | string>

function carriedOver(planned: Planned): Planned {
  if (!['ph', 'viscosity'].includes(planned.attribute) || planned.conditions) return planned
  const { viscosity } = planned
  const parts = planned.method.split(',').map((part) => part.trim())
  const said: Said = planned.attribute === 'ph' ? inPh(planned.method) : inViscosity(planned)
  if (Object.keys(said).length === 0) return planned
  const words = parts.filter((part) => part !== viscosity?.spindle && !isWhole(part, said, viscosity?.rpm))
  return { ...planned, method: words.join(', '), conditions: said }
}

const number = (text: string) => Number(text.replace(',', '.'))

function inViscosity({ method, viscosity }: Planned): Said {
  return given({
    ...(viscosity ? {} : { rpm: found(method, /(\d+(?:[.,]\d+)?) ?rpm\b/) }),
    seconds: found(method, /(\d+(?:[.,]\d+)?) ?s\b/),
    path: ['fixed', 'descending'].find((path) => new RegExp(`\\b${path}\\b`).test(method)),
    restMinutes: found(method, /\brests? (\d+(?:[.,]\d+)?) ?min/),
    sampleTemperatureC: found(method, /\bat (\d+(?:[.,]\d+)?) ?°C/),
  })
}

function inPh(method: string): Said {
  const [, parts] = /\bextract 1 to (\d+)/.exec(method) ?? []
  const [, minutes] = /(\d+) ?min(?:ute)?s?\b/.exec(method) ?? []
  const phMethod = ['extract', 'direct', 'water phase', 'broken emulsion'].find((one) =>
    new RegExp(`\\b${one}\\b`).test(method),
  )
  const isExtract = phMethod === 'extract'
  return given({
    phMethod,
    extractParts: isExtract && parts ? number(parts) : undefined,
    extractMinutes: isExtract && minutes ? number(minutes) : undefined,
    sampleTemperatureC: found(method, /\bat (\d+(?:[.,]\d+)?) ?°C/),
  })
}

function found(method: string, pattern: RegExp): number | undefined {
  const [, text] = pattern.exec(method) ?? []
  return text === undefined ? undefined : number(text)
}

function given(said: Record<string, number | string | undefined>): Said {
  return Object.fromEntries(Object.entries(said).filter(([, value]) => value !== undefined)) as Said
}

/** A part of the words that says what a field says now, and nothing besides. */
function isWhole(part: string, said: Said, rpm: number | undefined): boolean {
  const figure = (pattern: RegExp, value: number | string | undefined) => {
    const [, text] = pattern.exec(part) ?? []
    return text !== undefined && number(text) === value
  }
  return (
    part === said['path'] ||
    part === said['phMethod'] ||
    figure(/^(\d+(?:[.,]\d+)?) ?rpm$/, rpm ?? said['rpm']) ||
    figure(/^(\d+(?:[.,]\d+)?) ?s$/, said['seconds']) ||
    figure(/^rests? (\d+(?:[.,]\d+)?) ?min(?:utes)?$/, said['restMinutes']) ||
    figure(/^at (\d+(?:[.,]\d+)?) ?°C$/, said['sampleTemperatureC']) ||
    figure(/^extract 1 to (\d+)(?: in water)?$/, said['extractParts']) ||
    figure(/^(\d+) ?min(?:utes)?$/, said['extractMinutes'])
  )
}
