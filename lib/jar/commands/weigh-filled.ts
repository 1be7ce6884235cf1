import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { readJarCode } from '@/lib/jar/rules/code'
import type { filledJar } from '@/lib/jar/schema'
import { expectOne } from '@/lib/trail/queries'

/** Tare, gross and fill height as measured at filling; what was read of the jar later depends on them. */
export async function weighFilledJar(
  trx: Trx,
  _actor: Actor,
  scanned: string,
  { version, ...fill }: z.output<typeof filledJar>,
) {
  const code = readJarCode(scanned)
  const jar = code
    ? await trx
        .selectFrom('jar')
        .select(['jar.id', 'jar.code'])
        .select((eb) =>
          eb
            .exists(
              eb
                .selectFrom('reading')
                .select('reading.id')
                .whereRef('reading.jarId', '=', 'jar.id')
                .where('reading.attribute', 'in', ['mass', 'separation']),
            )
            .as('isRead'),
        )
        .where('jar.code', '=', code)
        .executeTakeFirst()
    : undefined
  if (!jar) throw refuse.notFound(`No jar has the code ${scanned.slice(0, 20)}. Read the label again.`)
  if (jar.isRead) {
    throw refuse.conflict(
      `${jar.code} was already read, and its readings count from its fill. Correct the readings instead.`,
    )
  }
  const written = await trx
    .updateTable('jar')
    .set({ ...fill, version: version + 1 })
    .where('id', '=', jar.id)
    .where('version', '=', version)
    .returning('version')
    .executeTakeFirst()
  return expectOne(trx, written, { table: 'jar', id: jar.id, thing: `jar ${jar.code}` })
}
