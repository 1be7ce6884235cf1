import { newId } from '@/lib/db/id'
import { weighFilledJar } from '@/lib/jar/commands/weigh-filled'
import { logCycleStep } from '@/lib/cycle/commands/log-half'
import { cycleStep } from '@/lib/cycle/schema'
import { approveVersion } from '@/lib/protocol/commands/approve-version'
import { createProtocol } from '@/lib/protocol/commands/write-protocol'
import { freshAttribute, freshOwn } from '@/lib/protocol/rules/fresh-attribute'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { newProtocol, type ProtocolPlan } from '@/lib/protocol/schema'
import { startStudy } from '@/lib/study/commands/start-study'
import { startedStudy } from '@/lib/study/schema'
import { daysAgo, type Filling } from './context'
import type { Batch } from './making'
import type { Places } from './places'
import { behaviours } from './truth'
import { dropsTyped } from './senses'
import { walkStudy, type StudyToWalk } from './walk'

export type Protocols = Record<
  | 'screen cream'
  | 'screen lotion'
  | 'half year'
  | 'half year stiff'
  | 'two years'
  | 'three years'
  | 'freeze-thaw'
  | 'feel',
  { id: string; plan: ProtocolPlan }
>

const quarters = [13, 26, 39, 52, 78, 104]

export async function fillProtocols(filling: Filling): Promise<Protocols> {
  const { liv, rune } = filling.people
  const at = daysAgo(filling, 797, 10)
  const make = async (name: string, asked: ProtocolPlan) => {
    const plan = asClientsAsk(asked)
    const versionId = newId()
    const { code } = await filling.act(liv, at, (trx) =>
      createProtocol(trx, liv, newProtocol.parse({ id: newId(), versionId, name, plan })),
    )
    await filling.act(rune, daysAgo(filling, 796, 11), (trx, now) =>
      approveVersion(trx, rune, { code, number: 1 }, { version: 1 }, now),
    )
    return { id: versionId, plan }
  }
  const long = readyMadePlan('long-term', 'lotion')
  const longStations = (last: number) =>
    long.stations
      .filter((s) => s.temperatureC === 25 || s.temperatureC === 40 || s.temperatureC === 5)
      .map((s) => ({
        ...s,
        timePoints: s.temperatureC === 40 ? [13, 26] : [...quarters, 156].filter((w) => w <= last),
      }))
  return {
    'screen cream': await make('Prototype screen, cream', withCycle(readyMadePlan('screen', 'cream'))),
    'screen lotion': await make('Prototype screen, lotion', readyMadePlan('screen', 'lotion')),
    'half year': await make('Half a year, cream', halfYear('cream')),
    'half year stiff': await make('Half a year, stiff cream', halfYear('stiff cream')),
    'two years': await make('Long-term, lotion, 24 months', {
      ...long,
      endWeeks: 104,
      retains: 2,
      stations: longStations(104),
    }),
    'three years': await make('Long-term, cream, 36 months', {
      ...readyMadePlan('long-term', 'cream'),
      retains: 2,
      stations: longStations(156),
    }),
    'freeze-thaw': await make('Freeze-thaw, lotion', withCycle(readyMadePlan('freeze-thaw', 'lotion'))),
    feel: await make('Texture and colour, lotion', texture()),
  }
}

export type Story = Pick<StudyToWalk, 'untilDaysAgo' | 'shiftedDaysAgo' | 'today'> & {
  title: string
  formula: string
  batches: Batch[]
  protocol: { id: string; plan: ProtocolPlan }
  startedDaysAgo: number
  clientId: string
  isShared: boolean
}

/** Starts a study with its initial readings, weighs the watch jars, cycles the freezer, and walks its pulls. */
export async function tellStory(
  filling: Filling,
  places: Places,
  story: Story,
  say: (done: number) => void,
): Promise<{ id: string; code: string }> {
  const { liv } = filling.people
  const behaviour = behaviours[story.formula]!
  const { plan, id: protocolVersionId } = story.protocol
  const id = newId()
  const startedAt = daysAgo(filling, story.startedDaysAgo, 8)
  const { code } = await filling.act(liv, new Date(startedAt.getTime() + 60_000), (trx) =>
    startStudy(
      trx,
      liv,
      startedStudy.parse({
        id,
        title: story.title,
        protocolVersionId,
        batchIds: story.batches.map((b) => b.id),
        startedAt: startedAt.toISOString(),
        clientId: story.clientId,
        isShared: story.isShared,
        initialReadings: story.batches.flatMap((batch) => initialOf(filling, plan, batch, behaviour, places)),
      }),
      filling.noise.uniform,
    ),
  )
  await weighWatchJars(filling, id, plan, startedAt)
  await logCycles(filling, id, story.startedDaysAgo)
  await walkStudy(filling, places, { ...story, id, plan, behaviour }, say)
  return { id, code }
}

function initialOf(
  filling: Filling,
  plan: ProtocolPlan,
  batch: Batch,
  b: (typeof behaviours)[string],
  places: Places,
) {
  const { normal } = filling.noise
  return plan.attributes.map((planned) => {
    const base = { batchId: batch.id, attribute: planned.attribute }
    switch (planned.attribute) {
      case 'ph':
        return {
          ...base,
          typed: [(b.ph + normal() * b.phSd * 0.4).toFixed(2)],
          detail: { sampleTemperatureC: 25 },
          instrumentId: places.instruments.ph,
        }
      case 'viscosity': {
        const { spindle, spindleConstant, rpm } = planned.viscosity!
        const torque = (b.viscosity * (1 + normal() * b.viscositySd * 0.4)) / (spindleConstant / rpm)
        return {
          ...base,
          typed: [torque.toFixed(1)],
          isTorque: true,
          detail: { spindle, rpm, sampleTemperatureC: 25 },
          instrumentId: places.instruments.viscometer,
        }
      }
      case 'separation':
        return { ...base, typed: ['0'], detail: { topMm: 0, bottomMm: 0, totalMm: plan.fillHeightMm } }
      case 'mass':
        return { ...base, typed: ['0'] }
      case 'type':
        return { ...base, typed: ['water outside'], detail: { typeMethod: 'dilution' as const } }
      case 'colour':
        return { ...base, typed: ['88.4 0.9 8.6'] }
      case 'droplets':
        return { ...base, typed: [dropsTyped(3.2, normal)] }
      case 'density':
        return { ...base, typed: ['0.978'], detail: { sampleTemperatureC: 25 } }
      case 'centrifuge':
        return { ...base, typed: ['none'] }
      case 'own.Foam-height':
        return { ...base, typed: ['142'] }
      default:
        return { ...base, typed: ['as the initial'], detail: { word: 'as the initial' } }
    }
  })
}

/** The demo's clients hold their creams to 2 %, narrower than a ready-made protocol begins with. */
function asClientsAsk(plan: ProtocolPlan): ProtocolPlan {
  const attributes = plan.attributes.map((planned) =>
    planned.attribute === 'separation'
      ? { ...planned, tolerance: { kind: 'range' as const, upper: 2 } }
      : planned,
  )
  return { ...plan, attributes }
}

/** Six weeks on what a hand and an eye notice first, with one attribute that only this protocol has. */
function texture(): ProtocolPlan {
  const screen = readyMadePlan('screen', 'lotion')
  const weeks = [1, 2, 4, 6]
  const foam = freshOwn('own.Foam-height', 'number')
  return {
    ...screen,
    endWeeks: 6,
    stations: screen.stations
      .filter(({ temperatureC }) => temperatureC === 25 || temperatureC === 45)
      .map((station) => ({ ...station, timePoints: weeks })),
    attributes: [
      ...screen.attributes.filter(({ attribute }) => ['separation', 'look', 'ph'].includes(attribute)),
      ...(['feel', 'type', 'colour', 'droplets', 'density'] as const).map(freshAttribute),
      {
        ...foam,
        own: {
          ...{ kind: 'number', unit: 'mm', decimals: 0, lower: 0, upper: 250, scatter: 4 },
          ...{ isGradual: true, jar: 'measuring' },
        },
        method: '2 g in 50 mL of water, shaken ten times, after one minute',
      },
      { ...freshAttribute('centrifuge'), isInitialOnly: true },
    ],
  }
}

async function weighWatchJars(filling: Filling, studyId: string, plan: ProtocolPlan, at: Date) {
  const { mada } = filling.people
  const jars = await filling.db
    .selectFrom('jar')
    .select(['code', 'version'])
    .where('studyId', '=', studyId)
    .where('kind', '=', 'watch')
    .execute()
  await filling.act(mada, new Date(at.getTime() + 3600_000), async (trx) => {
    for (const jar of jars) {
      const tareG = Math.round((88 + filling.noise.normal()) * 100) / 100
      const grossG = Math.round((tareG + plan.fillG + filling.noise.normal() * 0.3) * 100) / 100
      await weighFilledJar(trx, mada, jar.code, {
        version: jar.version,
        tareG,
        grossG,
        fillHeightMm: plan.fillHeightMm,
      })
    }
  })
}

/** Both halves of each cycle that is over. */
async function logCycles(filling: Filling, studyId: string, startedDaysAgo: number) {
  const { mada } = filling.people
  const place = await filling.db
    .selectFrom('studyStation')
    .select('id')
    .where('studyId', '=', studyId)
    .where('isFreezeThaw', '=', true)
    .executeTakeFirst()
  if (!place) return
  for (let cycle = 1; cycle <= 5; cycle += 1) {
    const endDays = startedDaysAgo - cycle * 7 + 1
    if (endDays < 0) return
    const half = (name: 'cold' | 'warm', from: number, to: number) =>
      cycleStep.parse({
        id: newId(),
        studyStationId: place.id,
        cycle,
        half: name,
        begunAt: daysAgo(filling, endDays + from, 16).toISOString(),
        endedAt: daysAgo(filling, endDays + to, 8).toISOString(),
        reachedC: name === 'cold' ? -10 : 25,
        isFrozenThrough: name === 'cold' ? true : null,
      })
    await filling.act(mada, daysAgo(filling, endDays, 9), async (trx, now) => {
      await logCycleStep(trx, mada, half('cold', 4, 2), now)
      await logCycleStep(trx, mada, half('warm', 2, 0), now)
    })
  }
}

/** A day frozen and a day in the room, as the lab's freezer cycles. */
function withCycle(plan: ProtocolPlan): ProtocolPlan {
  const cycle = { coldC: -10, coldHours: 24, warmC: 25, warmHours: 24, isFrozenThrough: true }
  return {
    ...plan,
    stations: plan.stations.map((s) => (s.kind === 'freeze-thaw' ? { ...s, cycle } : s)),
  }
}

/** A screen that goes on to week 26. A repeat takes a spare each time a rule asks for one: a cream that comes apart asks often. */
function halfYear(emulsion: 'cream' | 'stiff cream'): ProtocolPlan {
  const screen = readyMadePlan('screen', emulsion)
  const weeks = [1, 2, 3, 4, 5, 6, 8, 10, 12, 16, 20, 26]
  return {
    ...screen,
    endWeeks: 26,
    stations: screen.stations.map((s) => ({
      ...s,
      spares: 6,
      timePoints: s.kind === 'freeze-thaw' ? s.timePoints : weeks,
    })),
  }
}
