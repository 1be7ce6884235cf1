import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { difference } from '../rules/difference'
import { targetPhOf } from '../rules/target-ph'
import type { DifferenceQuery, EmulsionType } from '../schema'

/**
 * Two versions side by side, of one formula or of two: three statements. Without numbers the latest against
 * the one before it, or against the other formula's latest.
 */
export async function getDifference(db: Db, _actor: Actor, code: string, query: DifferenceQuery) {
  const otherCode = query.with?.trim() || code
  const versions = await db
    .selectFrom('formula')
    .innerJoin('formulaVersion', 'formulaVersion.formulaId', 'formula.id')
    .select(['formula.code', 'formula.name', 'formula.emulsionType'])
    .select(['formulaVersion.id', 'formulaVersion.number', 'formulaVersion.state', 'formulaVersion.note'])
    .select(['formulaVersion.targetPhLow', 'formulaVersion.targetPhHigh'])
    .where('formula.code', 'in', [code, otherCode])
    .where('formula.isReference', '=', false)
    .orderBy('formulaVersion.number')
    .execute()
  const own = versions.filter((version) => version.code === code)
  const others = versions.filter((version) => version.code === otherCode)
  if (!own.length) throw refuse.notFound(`There is no formula ${code}. Look for it in the list of formulas.`)
  if (!others.length) {
    throw refuse.notFound(`There is no formula ${otherCode} to compare ${code} with. Look in the list.`)
  }
  const isOwn = otherCode === code
  const to = pick(others, query.to ?? others.at(-1)!.number)
  const before = isOwn ? (own.findLast((version) => version.number < to.number) ?? own[0]!) : own.at(-1)!
  const from = pick(own, query.from ?? before.number)
  const ids = [from.id, to.id]
  const lines = await db
    .selectFrom('formulaLine')
    .select(['formulaVersionId', 'phase', 'ingredientId', 'inciName', 'function', 'percentThousandths'])
    .select(['density', 'isInternal', 'isRemainder', 'priceCentsPerKg'])
    .where('formulaVersionId', 'in', ids)
    .orderBy('position')
    .execute()
  const steps = await db
    .selectFrom('formulaStep')
    .select([
      'formulaVersionId',
      'phase',
      'instruction',
      'speedRpm',
      'minutes',
      'temperatureC',
      'lookFor',
      'caution',
    ])
    .where('formulaVersionId', 'in', ids)
    .orderBy('position')
    .execute()
  const side = (version: typeof from) => ({
    emulsionType: version.emulsionType as EmulsionType,
    targetPh: targetPhOf(version),
    lines: lines.filter((line) => line.formulaVersionId === version.id),
    steps: steps.filter((step) => step.formulaVersionId === version.id),
  })
  const [a, b] = [side(from), side(to)]
  return {
    from: { ...headOf(from), lines: a.lines },
    to: { ...headOf(to), lines: b.lines },
    numbers: own.map((version) => version.number),
    otherNumbers: others.map((version) => version.number),
    difference: difference(a, b),
  }
}

export type DifferencePage = Awaited<ReturnType<typeof getDifference>>

type Version = {
  code: string
  name: string
  emulsionType: string
  number: number
  state: string
  note: string
  targetPhLow: number | null
  targetPhHigh: number | null
}

function headOf({ code, name, emulsionType, number, state, note }: Version) {
  return { code, name, number, state, note, emulsionType: emulsionType as EmulsionType }
}

function pick<V extends Version>(versions: V[], number: number): V {
  const found = versions.find((version) => version.number === number)
  if (found) return found
  const latest = versions.at(-1)!
  throw refuse.notFound(`${latest.code} has no version ${number}. Its latest is version ${latest.number}.`)
}
