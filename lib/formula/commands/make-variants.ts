import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import {
  belowZeroSentence,
  levelsText,
  memberLines,
  noRemainderSentence,
  remainderWith,
  type Level,
} from '../rules/variants'
import type { MakeVariantsInput } from '../schema'
import { keepFigures } from './figures'

type Base = Awaited<ReturnType<typeof findBase>>

/**
 * A family of prototypes: each a formula of its own with a draft that holds the base's lines at other
 * levels, filled up by the q.s. line. All or none, and eight statements whatever their number.
 */
export async function makeVariants(trx: Trx, actor: Actor, code: string, input: MakeVariantsInput) {
  const base = await findBase(trx, code, input.fromVersionId)
  const made = await findMade(trx, input)
  if (made) return made
  const lines = await trx
    .selectFrom('formulaLine')
    .select(['id', 'position', 'phase', 'ingredientId', 'inciName', 'function', 'percentThousandths'])
    .select(['density', 'isInternal', 'isRemainder', 'priceCentsPerKg'])
    .where('formulaVersionId', '=', input.fromVersionId)
    .orderBy('position')
    .execute()
  const steps = await trx
    .selectFrom('formulaStep')
    .select(['position', 'phase', 'instruction', 'speedRpm', 'minutes', 'temperatureC', 'lookFor', 'caution'])
    .where('formulaVersionId', '=', input.fromVersionId)
    .execute()
  const varied = input.lineIds.map((id, index) => {
    const line = lines.find((one) => one.id === id)
    const field = { [`lineIds.${index}`]: 'Choose a line of this version.' }
    if (!line)
      throw refuse.invalid(`Version ${base.number} of ${code} has no such line. Choose again.`, field)
    if (!line.isRemainder) return line
    throw refuse.invalid(
      `${line.inciName} is the q.s. to 100 line, which balances the others. Vary another ingredient.`,
      field,
    )
  })
  assertFits(code, base.number, lines, input)
  const levelsOf = (shares: readonly number[]): Level[] =>
    varied.map(({ phase, inciName }, index) => ({ phase, inciName, percentThousandths: shares[index]! }))

  await insertFormulas(trx, actor, input, base, levelsOf)
  await trx
    .insertInto('formulaVersion')
    .values(
      input.members.map((member) => ({
        id: member.versionId,
        formulaId: member.id,
        number: 1,
        note: `From ${code}, version ${base.number}: ${levelsText(levelsOf(member.shares))}.`,
        targetPhLow: base.targetPhLow,
        targetPhHigh: base.targetPhHigh,
        createdBy: actor.personId,
      })),
    )
    .execute()
  const newLines = input.members.flatMap((member) =>
    memberLines(lines, sharesOf(input, member)).map((line) => ({
      ...line,
      id: newId(),
      formulaVersionId: member.versionId,
    })),
  )
  await trx.insertInto('formulaLine').values(newLines).execute()
  await keepFigures(
    trx,
    input.members.map((member) => ({
      formulaId: member.id,
      versionId: member.versionId,
      lines: newLines.filter((line) => line.formulaVersionId === member.versionId),
    })),
  )
  const newSteps = input.members.flatMap((member) =>
    steps.map((step) => ({ ...step, id: newId(), formulaVersionId: member.versionId })),
  )
  if (newSteps.length) await trx.insertInto('formulaStep').values(newSteps).execute()
  return input.members.map(({ id, versionId, code: own }) => ({ id, code: own, versionId }))
}

async function findBase(trx: Trx, code: string, versionId: string) {
  const base = await trx
    .selectFrom('formulaVersion')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['formula.id as formulaId', 'formula.clientId', 'formula.emulsionType', 'formulaVersion.number'])
    .select(['formulaVersion.targetPhLow', 'formulaVersion.targetPhHigh'])
    .where('formulaVersion.id', '=', versionId)
    .where('formula.code', '=', code)
    .where('formula.isReference', '=', false)
    .executeTakeFirst()
  if (!base) throw refuse.notFound(`${code} has no such version to vary. Load the page again.`)
  return base
}

/** What stands already when the same family is sent again; a code or id of something else is refused. */
async function findMade(trx: Trx, { fromVersionId, members }: MakeVariantsInput) {
  const found = await trx
    .selectFrom('formula')
    .select(['id', 'code', 'name', 'familyOfVersionId'])
    .where((eb) =>
      eb.or([
        eb(
          'id',
          'in',
          members.map((member) => member.id),
        ),
        eb(
          sql<string>`lower(code)`,
          'in',
          members.map((member) => member.code.toLowerCase()),
        ),
      ]),
    )
    .execute()
  if (!found.length) return null
  const isSame = members.every((member) =>
    found.some(
      (row) => row.id === member.id && row.code === member.code && row.familyOfVersionId === fromVersionId,
    ),
  )
  if (isSame) return members.map(({ id, versionId, code }) => ({ id, code, versionId }))
  const fields = Object.fromEntries(
    members.flatMap((member, index) => {
      const taken = found.find((row) => row.code.toLowerCase() === member.code.toLowerCase())
      return taken ? [[`members.${index}.code`, `${taken.code} belongs to ${taken.name}.`]] : []
    }),
  )
  const codes = found.map((row) => row.code).join(', ')
  throw refuse.conflict(
    `${codes} ${found.length === 1 ? 'is a formula' : 'are formulas'} already, so none was made. Choose other codes.`,
    { fields },
  )
}

function assertFits(
  code: string,
  number: number,
  lines: Parameters<typeof remainderWith>[0],
  input: MakeVariantsInput,
) {
  if (remainderWith(lines, new Map()) === null) {
    const sentence = noRemainderSentence(code, number)
    throw refuse.invalid(sentence, { fromVersionId: sentence })
  }
  const fields: Record<string, string> = {}
  input.members.forEach((member, index) => {
    const left = remainderWith(lines, sharesOf(input, member)) ?? 0
    if (left < 0) fields[`members.${index}.shares`] = belowZeroSentence(member.code, left)
  })
  const [first] = Object.values(fields)
  if (first) throw refuse.invalid(`${first} None of the family was made.`, fields)
}

async function insertFormulas(
  trx: Trx,
  actor: Actor,
  input: MakeVariantsInput,
  { clientId, emulsionType }: Base,
  levelsOf: (shares: readonly number[]) => Level[],
) {
  await trx
    .insertInto('formula')
    .values(
      input.members.map(({ id, code, name, shares }) => ({
        ...{ id, code, name, emulsionType, clientId, createdBy: actor.personId },
        familyOfVersionId: input.fromVersionId,
        levels: JSON.stringify(levelsOf(shares)),
      })),
    )
    .execute()
}

function sharesOf(input: MakeVariantsInput, member: MakeVariantsInput['members'][number]) {
  return new Map(input.lineIds.map((id, index) => [id, member.shares[index] ?? 0]))
}
