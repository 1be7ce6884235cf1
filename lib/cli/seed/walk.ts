import { AppError } from '@/lib/http/errors'
import { newId } from '@/lib/db/id'
import { listOpenPullJars, type OpenPullJar } from './open-jars'
import { logJar } from '@/lib/pull/commands/log-jar'
import { jarToLog } from '@/lib/reading/schema/entry'
import { pulledFor } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { sensed } from './senses'
import { daysAgo, type Filling } from './context'
import type { Places } from './places'
import { trueMassChange, truePh, trueSeparation, trueViscosity, type Behaviour } from './truth'

export type StudyToWalk = {
  id: string
  plan: ProtocolPlan
  behaviour: Behaviour
  startedDaysAgo: number
  /** Days before today up to which pulls were made; -1 walks today's too. */
  untilDaysAgo: number
  /** A day on which the spare viscometer was used and read high. */
  shiftedDaysAgo?: number
  /** Chance that a pull's jar was not read, with a reason. */
  today?: (jar: OpenPullJar) => boolean
}

/** Every pull of the study in time order, jar by jar, with the repeats that the rules ask for. */
export async function walkStudy(
  filling: Filling,
  places: Places,
  study: StudyToWalk,
  say: (done: number) => void,
) {
  const who = [filling.people.mada, filling.people.jos] as const
  let done = 0
  for (let round = 0; round < 4; round += 1) {
    const open = (await listOpenPullJars(filling.db, study.id)).filter((jar) => {
      const days = Math.round(study.startedDaysAgo - jar.timeWeeks * 7)
      return days > study.untilDaysAgo || (days === study.untilDaysAgo && study.today?.(jar))
    })
    if (open.length === 0) return
    for (const jar of open) {
      const days = Math.max(0, study.startedDaysAgo - jar.timeWeeks * 7)
      const at = daysAgo(filling, days, 9 + Math.floor(jar.order / 12), (jar.order * 5) % 60)
      const isShifted = study.shiftedDaysAgo !== undefined && Math.abs(days - study.shiftedDaysAgo) < 0.5
      const technician = who[jar.order % 2]!
      const entries = entriesOf(filling, places, study, jar, isShifted && round === 0)
      const input = {
        pullJarId: jar.id,
        version: jar.version,
        deviceNow: at.toISOString(),
        claimedAt: at.toISOString(),
        note: noteOf(study, jar),
        readings: entries,
        leaveOut: [],
      }
      await filling.act(technician, at, (trx) => keep(trx, technician, input))
      done += 1
      if (done % 10 === 0) say(done)
    }
  }
}

/** What the Bench does when it is asked whether a value is so: it is, and it is kept as a doubt. */
async function keep(trx: Parameters<typeof logJar>[0], who: Parameters<typeof logJar>[1], input: object) {
  try {
    return await logJar(trx, who, jarToLog.parse(input))
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'confirm') throw error
    const sure = jarToLog.parse(input)
    return logJar(trx, who, { ...sure, readings: sure.readings.map((r) => ({ ...r, isConfirmed: true })) })
  }
}

function entriesOf(
  filling: Filling,
  places: Places,
  study: StudyToWalk,
  jar: OpenPullJar,
  isShifted: boolean,
) {
  const { behaviour: b, plan } = study
  const { normal } = filling.noise
  const weeks = jar.timeWeeks
  const place = { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw }
  const percent = trueSeparation(b, place, weeks)
  const asked =
    jar.asks === 'repeat'
      ? plan.attributes.filter((planned) => planned.attribute === jar.attribute)
      : pulledFor(plan, jar.asks === 'watch' ? 'watch' : 'measuring')
  return asked.flatMap((planned) =>
    Array.from({ length: jar.asks === 'watch' ? 1 : planned.replicates }, (_, i) => {
      const base = { id: newId(), attribute: planned.attribute, replicate: i + 1 }
      switch (planned.attribute) {
        case 'separation': {
          const total = plan.fillHeightMm
          const layer = percent === 0 ? 0 : Math.max(0, (percent / 100) * total + normal() * 0.12)
          const topMm = Math.round(layer * b.oilShare * 10) / 10
          const bottomMm = Math.round(layer * (1 - b.oilShare) * 10) / 10
          return {
            ...base,
            typed: `${topMm} mm top, ${bottomMm} mm below`,
            detail: { topMm, bottomMm, totalMm: total },
          }
        }
        case 'mass': {
          if (jar.tareG === null || jar.grossG === null) {
            const change = trueMassChange(b, place, weeks) + normal() * 0.02
            return { ...base, typed: change.toFixed(2), detail: {} }
          }
          const net = jar.grossG - jar.tareG
          const grossG = jar.grossG + (net * (trueMassChange(b, place, weeks) + normal() * 0.02)) / 100
          return {
            ...base,
            typed: grossG.toFixed(2),
            detail: { grossG: Number(grossG.toFixed(2)) },
            instrumentId: places.instruments.balance,
          }
        }
        case 'ph':
          return {
            ...base,
            typed: (truePh(b, place, weeks) + normal() * b.phSd).toFixed(2),
            detail: { sampleTemperatureC: 25 },
            instrumentId: places.instruments.ph,
          }
        case 'viscosity': {
          const { spindle, spindleConstant, rpm } = planned.viscosity!
          const high = isShifted ? 1 + 4.4 * Math.max(b.viscositySd, 0.03) : 1
          const mPas = trueViscosity(b, place, weeks) * (1 + normal() * b.viscositySd) * high
          const torquePercent = Math.round((mPas / (spindleConstant / rpm)) * 10) / 10
          return {
            ...base,
            typed: torquePercent.toFixed(1),
            detail: { torquePercent: Number(torquePercent.toFixed(1)), spindle, rpm, sampleTemperatureC: 25 },
            instrumentId: isShifted ? places.instruments.otherViscometer : places.instruments.viscometer,
          }
        }
        case 'look':
        case 'feel':
        case 'odour': {
          const word = percent > 4 ? 'changed' : percent > 1.5 ? 'slightly changed' : 'as the initial'
          const felt = percent > 4 ? 'slightly changed' : 'as the initial'
          const kept = { look: word, feel: felt, odour: 'as the initial' }[planned.attribute]
          return { ...base, typed: kept, detail: { word: kept } }
        }
        default:
          return { ...base, ...sensed(planned, place, weeks, normal)! }
      }
    }),
  )
}

function noteOf(study: StudyToWalk, jar: OpenPullJar): string {
  const percent = trueSeparation(study.behaviour, jar, jar.timeWeeks)
  if (jar.asks !== 'watch' || percent < 1.5) return ''
  return jar.isFreezeThaw
    ? 'Beads of water on the wall, looks curdled.'
    : 'Water at the foot, looked thinner.'
}
