import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { netGrams } from '@/lib/science/making'
import type { FillJarInput } from '../schema'
import { assertState, findBatch, whenDone } from './find-batch'

/** One jar as it was filled and closed. The rows are optional; a correction is a new one that says why. */
export async function fillJar(trx: Trx, actor: Actor, code: string, input: FillJarInput) {
  const batch = await findBatch(trx, code)
  const jars = await trx
    .selectFrom('batchJar')
    .select(['id', 'number', 'supersedes'])
    .where('batchId', '=', batch.id)
    .execute()
  const { claimedAt: _claimed, deviceNow: _device, ...values } = input
  const answer = { id: input.id, number: input.number, fillG: netGrams(input.grossG, input.tareG) }
  if (jars.some((jar) => jar.id === input.id)) return answer
  assertState(batch, ['making', 'resting', 'released'], 'Nothing is filled from it.')
  const before = jars.find((jar) => jar.id === input.supersedes)
  if (input.supersedes === null && jars.some((jar) => jar.number === input.number)) {
    const sentence = `Jar ${input.number} is on record already. Correct its row, or give the next number.`
    throw refuse.invalid(sentence, { number: sentence })
  }
  if (input.supersedes !== null) {
    if (before?.number !== input.number || jars.some((jar) => jar.supersedes === input.supersedes)) {
      throw refuse.conflict(
        `That row of jar ${input.number} was corrected already or is not there. Load the page again.`,
      )
    }
    if (!input.reason) {
      throw refuse.invalid(`Say why jar ${input.number} is corrected.`, {
        reason: 'Say why the jar is corrected.',
      })
    }
  }
  const at = { filledAt: whenDone(batch, input), recordedAt: batch.now }
  await trx
    .insertInto('batchJar')
    .values({ ...values, ...at, batchId: batch.id, filledBy: actor.personId })
    .execute()
  return answer
}
