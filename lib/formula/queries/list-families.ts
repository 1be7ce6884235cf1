import type { Db } from '@/lib/db/client'
import type { Level } from '../rules/variants'

export type Family = {
  /** The version that the members were varied from. */
  base: { code: string; number: number }
  members: { code: string; levels: Level[] }[]
}

/** The family that a formula is a member of, and those that were made from its own versions. */
export async function listFamilies(db: Db, ofVersionId: string | null, formulaId: string): Promise<Family[]> {
  const rows = await db
    .selectFrom('formula as member')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'member.familyOfVersionId')
    .innerJoin('formula as base', 'base.id', 'formulaVersion.formulaId')
    .select(['member.code', 'member.familyOfVersionId', 'base.code as baseCode', 'formulaVersion.number'])
    .select((eb) => eb.ref('member.levels').$castTo<Level[]>().as('levels'))
    .where((eb) =>
      eb.or([
        eb('formulaVersion.formulaId', '=', formulaId),
        ...(ofVersionId ? [eb('member.familyOfVersionId', '=', ofVersionId)] : []),
      ]),
    )
    .orderBy('formulaVersion.number')
    .orderBy('member.code')
    .execute()
  // What was varied together is one family: the same version, the same ingredients.
  const families = new Map<string, Family>()
  for (const { code, levels, baseCode, number, familyOfVersionId } of rows) {
    const names = levels.map((level) => `${level.phase} ${level.inciName}`)
    const key = [familyOfVersionId, ...names].join('\n')
    const family = families.get(key) ?? { base: { code: baseCode, number }, members: [] }
    family.members.push({ code, levels })
    families.set(key, family)
  }
  return [...families.values()]
}
