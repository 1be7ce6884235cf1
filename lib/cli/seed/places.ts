import { logCalibration } from '@/lib/calibration/commands'
import { newCalibration } from '@/lib/calibration/schema'
import { newId } from '@/lib/db/id'
import { createInstrument } from '@/lib/instrument/commands/keep'
import { newInstrument } from '@/lib/instrument/schema'
import { createStation } from '@/lib/station/commands/keep-station'
import { logTemperatures } from '@/lib/station/commands/log-temperatures'
import { newStation, type NewStation } from '@/lib/station/schema'
import { daysAgo, type Filling } from './context'

type Kind = Pick<NewStation, 'name' | 'temperatureC' | 'lowC' | 'highC'> & Partial<NewStation>

const stations: Kind[] = [
  {
    name: 'freezer and room',
    kind: 'freeze-thaw',
    temperatureC: null,
    lowC: null,
    highC: null,
    cycleLowC: -10,
    cycleHighC: 25,
    caution: 'Frozen glass cracks: hold the jar low, wear eye protection.',
  },
  { name: 'cold cabinet', temperatureC: 5, lowC: 2, highC: 8 },
  { name: 'room cabinet', temperatureC: 25, lowC: 23, highC: 27, humidityPercent: 60 },
  { name: 'warm cabinet', temperatureC: 30, lowC: 28, highC: 32, humidityPercent: 65 },
  {
    name: 'oven 2',
    temperatureC: 40,
    lowC: 38,
    highC: 42,
    humidityPercent: 75,
    caution: 'Hot glass: gloves and eye protection.',
  },
  { name: 'oven 3', temperatureC: 45, lowC: 43, highC: 47, caution: 'Hot glass: gloves and eye protection.' },
]

const dailyChecks = {
  meter: { kind: 'meter', buffer: 'phosphate', allowedPh: 0.05 },
  viscometer: {
    kind: 'viscometer',
    spindle: 'disc 4',
    rpm: 20,
    temperatureC: 25,
    fluidMPas: 5000,
    allowedPercent: 2,
  },
  balance: { kind: 'balance', weightG: 50, allowedG: 0.01 },
} as const

export type Places = {
  stations: { id: string; name: string; temperatureC: number | null }[]
  instruments: { ph: string; viscometer: string; otherViscometer: string; balance: string }
}

export async function fillPlaces(filling: Filling): Promise<Places> {
  const { hedda, mada } = filling.people
  const begun = daysAgo(filling, 799)
  const made = await filling.act(hedda, begun, async (trx) => {
    const list = []
    for (const [i, station] of stations.entries()) {
      const id = newId()
      await createStation(
        trx,
        hedda,
        newStation.parse({
          id,
          kind: 'temperature',
          walkOrder: i + 1,
          shelves: 6,
          placesPerShelf: 40,
          ...station,
        }),
      )
      list.push({ id, name: station.name, temperatureC: station.temperatureC ?? null })
    }
    const spindles = [
      { name: 'disc 4', constant: 2000 },
      { name: 'T-bar C', constant: 10_000 },
      { name: 'T-bar D', constant: 20_000 },
    ]
    const instrument = async (code: string, kind: 'meter' | 'viscometer' | 'balance', name: string) => {
      const id = newId()
      await createInstrument(
        trx,
        hedda,
        newInstrument.parse({
          id,
          code,
          kind,
          name,
          spindles: kind === 'viscometer' ? spindles : [],
          dailyCheck: dailyChecks[kind],
        }),
      )
      return id
    }
    return {
      stations: list,
      instruments: {
        ph: await instrument('P1', 'meter', 'pH meter by the window'),
        viscometer: await instrument('V1', 'viscometer', 'viscometer on the stand'),
        otherViscometer: await instrument('V2', 'viscometer', 'viscometer, spare'),
        balance: await instrument('B1', 'balance', 'balance, 0.01 g'),
      },
    }
  })
  const { ph, viscometer, otherViscometer, balance } = made.instruments
  const checks = [
    // Buffers 4.01 and 7.00 at 25 °C with a slope of about 99 %.
    {
      instrumentId: ph,
      check: {
        kind: 'meter',
        temperatureC: 25,
        points: [
          { bufferPh: 4.01, mV: 175.6 },
          { bufferPh: 7, mV: 0.4 },
        ],
      },
    },
    {
      instrumentId: viscometer,
      check: { kind: 'viscometer', spindle: 'disc 4', rpm: 20, fluidMPas: 5000, readMPas: 5030 },
    },
    {
      instrumentId: otherViscometer,
      check: { kind: 'viscometer', spindle: 'disc 4', rpm: 20, fluidMPas: 5000, readMPas: 4980 },
    },
    { instrumentId: balance, check: { kind: 'balance', weightG: 50, readG: 50 } },
  ]
  for (const days of [798, 620, 440, 260, 80]) {
    const at = daysAgo(filling, days, 8)
    await filling.act(mada, at, async (trx, now) => {
      for (const check of checks)
        await logCalibration(
          trx,
          mada,
          newCalibration.parse({
            id: newId(),
            dueOn: isoDay(new Date(at.getTime() + 190 * 24 * 3600 * 1000)),
            ...check,
          }),
          now,
        )
    })
  }
  return made
}

/** Station logs: one entry a day, each station around its own temperature; one hot weekend in the room cabinet. */
export async function fillTemperatures(filling: Filling, places: Places): Promise<void> {
  const { mada } = filling.people
  for (const station of places.stations) {
    if (station.temperatureC === null) continue
    const mean = station.temperatureC + (filling.noise.uniform() - 0.5) * 0.4
    const readings = Array.from({ length: 790 }, (_, i) => {
      const days = 789 - i
      const isHotWeekend = station.name === 'room cabinet' && (days === 141 || days === 142)
      const celsius = isHotWeekend
        ? 30.5 + filling.noise.uniform() * 1.5
        : mean + filling.noise.normal() * 0.35
      return {
        id: newId(),
        measuredAt: daysAgo(filling, days, 7, 30).toISOString(),
        temperatureC: Math.round(celsius * 10) / 10,
        source: 'logger' as const,
      }
    })
    await filling.act(mada, daysAgo(filling, 0, 7, 45), (trx, now) =>
      logTemperatures(trx, mada, station.id, { readings }, now),
    )
  }
}

export function isoDay(at: Date): string {
  return at.toISOString().slice(0, 10)
}
