import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { AppError, refuse } from '@/lib/http/errors'
import { doneAt } from '@/lib/reading/rules/claimed-time'
import { isCurrentPress } from '../queries/current'
import type { CyclePlace } from '../queries/board'
import { halfName, refuseBegin, refuseUnlessRunning } from '../rules/refusals'
import { shortfalls } from '../rules/shortfall'
import { cycleState, type CycleRecord, type Running } from '../rules/state'
import type { CyclePressed } from '../schema'
import { claimPlace } from './claim-place'
import { reachBackFromHalf } from './reach-back'

export type PressAnswer = { id: string; at: string; shortfalls: string[] }

/** One press at the board: begins, holds, lets go on or ends a half. Sent twice it is kept once. */
export async function pressCycle(
  trx: Trx,
  actor: Actor,
  input: CyclePressed,
  now: string,
): Promise<PressAnswer> {
  const place = await claimPlace(trx, input.studyStationId)
  const before = await findPress(trx, input)
  if (before) return { id: input.id, at: before.at, shortfalls: [] }
  if (place.studyState === 'closed')
    throw refuse.conflict(`Study ${place.studyCode} is closed, so it takes no more cycles.`)
  const record: CycleRecord = { ...place, asked: place.asked ?? undefined }
  const state = cycleState(record, now)
  const at = doneAt(input, now)
  if (input.press === 'end')
    return endHalf(trx, actor, place, refuseUnlessRunning(state, input), { input, at, record })
  if (input.press === 'begin') {
    refuseBegin(state, input, place.cycles)
    if (state.kind === 'waiting' && state.since !== null && Date.parse(at) < Date.parse(state.since))
      throw tooEarly('The half before it had not ended then.')
  } else {
    refuseHold(refuseUnlessRunning(state, input), input.press, at)
  }
  await trx
    .insertInto('cyclePress')
    .values({
      id: input.id,
      studyStationId: input.studyStationId,
      cycle: input.cycle,
      half: input.half,
      press: input.press,
      at,
      claimedAt: input.claimedAt ?? null,
      reason: input.press === 'begin' ? '' : input.reason,
      supersedesId: input.press === 'begin' ? await findTakenBack(trx, input) : null,
      recordedBy: actor.personId,
    })
    .execute()
  return { id: input.id, at, shortfalls: [] }
}

async function findPress(trx: Trx, { id, press }: CyclePressed) {
  return press === 'end'
    ? trx.selectFrom('cycleStep').select('endedAt as at').where('id', '=', id).executeTakeFirst()
    : trx.selectFrom('cyclePress').select('at').where('id', '=', id).executeTakeFirst()
}

/** What a half that begins anew stands in the place of: the taking back of its begin before. */
async function findTakenBack(
  trx: Trx,
  { studyStationId, cycle, half }: CyclePressed,
): Promise<string | null> {
  const last = await trx
    .selectFrom('cyclePress')
    .select('id')
    .where('studyStationId', '=', studyStationId)
    .where('cycle', '=', cycle)
    .where('half', '=', half)
    .where('press', '=', 'begin')
    .where('isVoid', '=', true)
    .orderBy('recordedAt', 'desc')
    .executeTakeFirst()
  return last?.id ?? null
}

type End = { input: Extract<CyclePressed, { press: 'end' }>; at: string; record: CycleRecord }

async function endHalf(
  trx: Trx,
  actor: Actor,
  place: CyclePlace,
  state: Running,
  { input, at, record }: End,
): Promise<PressAnswer> {
  if (Date.parse(at) <= Date.parse(state.begunAt)) throw tooEarly('The half began after that.')
  const { cycle, half, reachedC, coreC, isFrozenThrough } = input
  const ended = cycleState(record, at) as Running
  const found = shortfalls(
    place,
    { cycle, half, reachedC, coreC, isFrozenThrough, hours: ended.hours },
    record.asked,
  )
  if (found.length > 0 && !input.isConfirmed) {
    throw new AppError(
      409,
      'confirm',
      `${found.join(' ')} If ${halfName(input)} ends now, the readings after it carry a doubt. Is it so?`,
      { detail: { shortfalls: found } },
    )
  }
  const begin = await trx
    .selectFrom('cyclePress')
    .select('id')
    .where('studyStationId', '=', input.studyStationId)
    .where('cycle', '=', cycle)
    .where('half', '=', half)
    .where('press', '=', 'begin')
    .where(isCurrentPress('cyclePress'))
    .executeTakeFirstOrThrow()
  await trx
    .insertInto('cycleStep')
    .values({
      id: input.id,
      studyStationId: input.studyStationId,
      cycle,
      half,
      begunAt: state.begunAt,
      endedAt: at,
      reachedC,
      coreC,
      isFrozenThrough: half === 'cold' ? isFrozenThrough : null,
      note: input.note,
      beginPressId: begin.id,
      heldHours: Math.round(ended.heldHours * 100) / 100,
      claimedAt: input.claimedAt ?? null,
      recordedBy: actor.personId,
    })
    .execute()
  // An end that is told late may lie before what was read meanwhile.
  const kept = { cycle, half, reachedC, coreC, isFrozenThrough, hours: ended.hours }
  await reachBackFromHalf(trx, actor, place, { id: input.id, endedAt: at, ...kept })
  return { id: input.id, at, shortfalls: found }
}

function refuseHold(state: Running, press: 'hold' | 'go on', at: string): void {
  if (press === 'hold' && state.hold)
    throw refuse.conflict(`${state.hold.by} holds this half already: ${state.hold.reason}. Reload to see it.`)
  if (press === 'go on' && !state.hold)
    throw refuse.conflict('This half is not held, so it goes on as it is. Reload to see it.')
  if (Date.parse(at) < Date.parse(state.hold?.since ?? state.begunAt))
    throw tooEarly(state.hold ? 'The hold began after that.' : 'The half began after that.')
}

function tooEarly(sentence: string) {
  return refuse.invalid(`${sentence} Correct the time.`, {
    claimedAt: sentence,
  })
}
