import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { deviations } from '../rules/steps'
import type { DoStepInput } from '../schema'
import { assertState, findBatch, staleRow, whenDone } from './find-batch'

/** A press at one process step: begun, ended, or done with what was really done beside what was prescribed. */
export async function doStep(trx: Trx, actor: Actor, code: string, input: DoStepInput) {
  const batch = await findBatch(trx, code)
  const step = await trx
    .selectFrom('batchStep')
    .innerJoin('formulaStep', 'formulaStep.id', 'batchStep.formulaStepId')
    .select(['batchStep.id', 'batchStep.position', 'batchStep.version', 'batchStep.doneAt'])
    .select(['formulaStep.speedRpm', 'formulaStep.minutes', 'formulaStep.temperatureC'])
    .where('batchStep.id', '=', input.stepId)
    .where('batchStep.batchId', '=', batch.id)
    .executeTakeFirst()
  if (!step) throw refuse.notFound(`${code} has no such step. Load the page again.`)
  const entries = await trx
    .selectFrom('batchStepEntry')
    .select(['id', 'kind'])
    .where('batchStepId', '=', step.id)
    .execute()
  const { id, version, doneAt } = step
  if (entries.some((entry) => entry.id === input.id)) return { id, version, doneAt }
  assertState(batch, ['making'], 'Its process is closed.')
  const what = `step ${step.position + 1}`
  if (version !== input.version) throw await staleRow(trx, 'batch_step', id, what)
  assertInOrder(what, entries, input)
  const happenedAt = whenDone(batch, input)
  if (input.kind === 'done') assertTold(what, step, input)
  const { kind, note, reason, isFromPaper } = input
  const { actualSpeedRpm, actualMinutes, actualTemperatureC } = input
  const actual = { actualSpeedRpm, actualMinutes, actualTemperatureC, note }
  await trx
    .insertInto('batchStepEntry')
    .values({
      id: input.id,
      batchStepId: id,
      kind,
      ...actual,
      reason,
      isFromPaper,
      happenedAt,
      recordedAt: batch.now,
      recordedBy: actor.personId,
    })
    .execute()
  const isDone = kind === 'done'
  return trx
    .updateTable('batchStep')
    .set({ version: version + 1 })
    .$if(isDone, (query) => query.set({ ...actual, doneBy: actor.personId, doneAt: happenedAt }))
    .where('id', '=', id)
    .returning(['id', 'version', 'doneAt'])
    .executeTakeFirstOrThrow()
}

function assertInOrder(what: string, entries: readonly { kind: string }[], { kind }: DoStepInput) {
  const count = (of: string) => entries.filter((entry) => entry.kind === of).length
  const isRunning = count('start') > count('end')
  if (kind === 'start' && isRunning) throw refuse.conflict(`${capital(what)} runs already. End it first.`)
  if (kind === 'end' && !isRunning) throw refuse.conflict(`${capital(what)} does not run. Begin it first.`)
}

function assertTold(
  what: string,
  step: {
    doneAt: string | null
    speedRpm: number | null
    minutes: number | null
    temperatureC: number | null
  },
  input: DoStepInput,
) {
  if (step.doneAt !== null && !input.reason) {
    throw refuse.invalid(`${capital(what)} was logged already. Say why it is corrected.`, {
      reason: 'Say why the step is corrected.',
    })
  }
  const otherwise = deviations(step, input)
  if (otherwise.length && !input.note) {
    throw refuse.invalid(`${capital(what)} was done with ${otherwise.join(' and ')}. Say why.`, {
      note: `Say why: ${otherwise.join(' and ')}.`,
    })
  }
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
