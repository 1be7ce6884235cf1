import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import type { NewReference } from './schema'

/**
 * A lot of a bought-in product, ready to stand beside a study. The product's name is known once; each lot of it is
 * a batch that nobody here made, so nothing of it is weighed and it needs no release. Sent twice it stands once.
 */
export async function addReference(trx: Trx, actor: Actor, input: NewReference) {
  await sql`select pg_advisory_xact_lock(hashtext('a reference product'))`.execute(trx)
  const same = await trx
    .selectFrom('batch')
    .select(['id', 'code'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (same) return same
  const product = (await findProduct(trx, input)) ?? (await insertProduct(trx, actor, input))
  const lots = await trx
    .selectFrom('batch')
    .select(['code', 'productLot'])
    .where('formulaVersionId', '=', product.versionId)
    .execute()
  const known = lots.find((one) => one.productLot.toLowerCase() === input.lot.toLowerCase())
  if (known) {
    throw refuse.invalid(
      `Lot ${input.lot} of ${input.name} is here already as ${known.code}. Choose it from the list.`,
      {
        lot: `This lot is ${known.code}.`,
      },
    )
  }
  const code = `${product.code}-${lots.length + 1}`
  await trx
    .insertInto('batch')
    .values({
      id: input.id,
      code,
      formulaVersionId: product.versionId,
      sizeG: input.grams,
      yieldG: input.grams,
      state: 'released',
      productLot: input.lot,
      note: input.note,
      decisionReason: 'Bought in as a reference',
      decidedBy: actor.personId,
      decidedAt: sql<string>`app_now()`,
      createdBy: actor.personId,
    })
    .execute()
  return { id: input.id, code }
}

type Product = { code: string; versionId: string }

async function findProduct(trx: Trx, { name, emulsionType }: NewReference): Promise<Product | undefined> {
  const found = await trx
    .selectFrom('formula')
    .innerJoin('formulaVersion', 'formulaVersion.formulaId', 'formula.id')
    .select(['formula.code', 'formula.emulsionType', 'formulaVersion.id as versionId'])
    .where('formula.isReference', '=', true)
    .where(sql<string>`lower(formula.name)`, '=', name.toLowerCase())
    .executeTakeFirst()
  if (found && found.emulsionType !== emulsionType) {
    throw refuse.invalid(
      `${name} is known here as ${found.emulsionType}. Say the same of this lot, or give the product another name.`,
      { emulsionType: `Known as ${found.emulsionType}.` },
    )
  }
  return found
}

async function insertProduct(trx: Trx, actor: Actor, input: NewReference): Promise<Product> {
  const { next } = await trx
    .selectFrom('formula')
    .select(sql<number>`coalesce(max(substring(code from '^R-([0-9]{1,6})$')::integer), 0) + 1`.as('next'))
    .executeTakeFirstOrThrow()
  const code = `R-${String(next).padStart(3, '0')}`
  const [formulaId, versionId] = [newId(), newId()]
  const { name, emulsionType } = input
  await trx
    .insertInto('formula')
    .values({ id: formulaId, code, name, emulsionType, isReference: true, createdBy: actor.personId })
    .execute()
  await trx
    .insertInto('formulaVersion')
    .values({ id: versionId, formulaId, number: 1, state: 'locked', createdBy: actor.personId })
    .execute()
  return { code, versionId }
}
