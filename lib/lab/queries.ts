import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { LabelGrid } from '@/lib/label/rules/grid'

/** Null before the first set-up. */
export async function findLab(db: Db) {
  const lab = await db
    .selectFrom('lab')
    .select(['id', 'name', 'timeZone', 'workingDays', 'demoFilledAt', 'version'])
    .select((eb) => eb.ref('labelGrid').$castTo<LabelGrid | null>().as('labelGrid'))
    .executeTakeFirst()
  return lab ?? null
}

export type Lab = NonNullable<Awaited<ReturnType<typeof findLab>>>

export async function getLab(db: Db): Promise<Lab> {
  const lab = await findLab(db)
  if (!lab)
    throw refuse.conflict('The lab is not set up yet. Open /setup with the code that the server printed.')
  return lab
}

/** Set-up is open as long as nobody at all has been added. */
export async function isSetUp(db: Db): Promise<boolean> {
  const anyone = await db
    .selectFrom('person')
    .select('id')
    .where('isSystem', '=', false)
    .limit(1)
    .executeTakeFirst()
  return anyone !== undefined
}
