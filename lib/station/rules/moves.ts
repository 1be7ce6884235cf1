import type { EntryDoubt } from '@/lib/reading/rules/entry-doubts'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { counted, listed, withVariant } from '@/lib/study/rules/words'
import { differenceOf, isLit, type Keeps } from './keeps'

/** A station as a move goes to it. */
export type Target = {
  id: string
  name: string
  kind: string
  temperatureC: number | null
  cycleLowC: number | null
  cycleHighC: number | null
  humidityPercent: number | null
  lightLux: number | null
  lightUvWm2: number | null
}

/** A standing jar with what its series asks of its place. */
export type MovableJar = {
  id: string
  code: string
  studyCode: string
  studyStationId: string
  kindAsked: string
  temperatureC: number | null
  isFreezeThaw: boolean
  variant: string
  cycleLowC: number | null
  cycleHighC: number | null
  humidityPercent: number | null
  light: string | null
}

/** How many of a series' jars stand where, before the move. */
export type SeriesPlace = { studyStationId: string; stationId: string; jars: number }

export type MoveEffect = {
  studyStationId: string
  studyCode: string
  /** "S-004 at 45 °C". */
  series: string
  jars: number
  /** The place differs from what the series asks for, so that later readings of these jars are doubted. */
  isElsewhere: boolean
  /** Most of the series' jars stand there afterwards: its temperature record is that of the new station. */
  follows: boolean
  sentence: string
}

export function keepsOf({ kind, temperatureC, cycleLowC, cycleHighC, ...lamps }: Target): Keeps {
  return { kind, temperatureC, cycleLowC, cycleHighC, isLit: isLit(lamps) }
}

export function askedOf(jar: MovableJar): Keeps {
  const { kindAsked: kind, temperatureC, cycleLowC, cycleHighC, light } = jar
  return { kind, temperatureC, cycleLowC, cycleHighC, isLit: light !== null }
}

/** What a move means for each series: said before it is confirmed and kept with it. */
export function moveEffects(
  jars: readonly MovableJar[],
  from: { id: string; name: string },
  to: Target,
  places: readonly SeriesPlace[],
): MoveEffect[] {
  const series = [...new Set(jars.map((jar) => jar.studyStationId))]
  return series.map((studyStationId) => {
    const moved = jars.filter((jar) => jar.studyStationId === studyStationId)
    const [jar] = moved as [MovableJar]
    const own = places.filter((one) => one.studyStationId === studyStationId)
    const standing = own.reduce((sum, one) => sum + one.jars, 0)
    const there = moved.length + (own.find((one) => one.stationId === to.id)?.jars ?? 0)
    const follows = there > standing / 2
    const difference = differenceOf(askedOf(jar), keepsOf(to))
    const name = `${jar.studyCode} ${placeAsked(jar)}`
    return {
      studyStationId,
      studyCode: jar.studyCode,
      series: name,
      jars: moved.length,
      isElsewhere: difference !== null,
      follows,
      sentence: [
        meaning(name, moved.length, standing, difference),
        follows
          ? `The temperature record of the series is that of ${to.name} from then on.`
          : `Its temperature record stays that of the station where most of its jars stand.`,
        humidityNote(jar, to),
      ]
        .filter(Boolean)
        .join(' '),
    }
  })
}

function placeAsked(jar: MovableJar): string {
  const place = jar.isFreezeThaw
    ? 'in freeze-thaw'
    : jar.temperatureC === null
      ? 'on the road'
      : `at ${String(jar.temperatureC).replace('-', '−')} °C`
  return withVariant(place, jar.variant)
}

function meaning(name: string, moved: number, standing: number, difference: string | null): string {
  const count =
    moved === standing ? `all ${counted(standing, 'jar')}` : `${counted(moved, 'jar')} of ${standing}`
  if (difference === null) return `${name}: ${count}, at what the protocol asks for; the series goes on.`
  const these = moved === 1 ? 'it' : 'them'
  return `${name}: ${count} will stand ${difference}. Each later reading of ${these} is doubted until somebody says whether it counts; what was read before stays as it is.`
}

/** In closed glass humidity hardly counts, so it is said and judged by nobody but the reader [practice]. */
function humidityNote({ humidityPercent }: MovableJar, to: Target): string | null {
  if (humidityPercent === null || humidityPercent === to.humidityPercent) return null
  const there = to.humidityPercent === null ? 'not stated' : `${to.humidityPercent} %`
  return `Humidity is ${there} instead of ${humidityPercent} %.`
}

/** Where a jar was moved to, and when. */
export type JarStay = Keeps & { at: string; name: string }

/** A jar that stood elsewhere than its series asks for is doubted at every later reading, back in its place too. */
export function placeDoubts(
  asked: Keeps,
  stays: readonly JarStay[],
  measuredAt: string,
  zone: string,
): EntryDoubt[] {
  const past = stays.filter((stay) => Date.parse(stay.at) < Date.parse(measuredAt))
  const told = past.flatMap((stay, index) => {
    const difference = differenceOf(asked, stay)
    if (difference === null) return []
    const from = spokenDay(dayIn(zone, stay.at))
    const next = past[index + 1]
    const period = next ? `from ${from} to ${spokenDay(dayIn(zone, next.at))}` : `from ${from} on`
    return [`${difference} ${period}`]
  })
  if (told.length === 0) return []
  return [
    { reason: 'place', sentence: `The jar stood ${listed(told)}. Say whether the jar counts as it is.` },
  ]
}

/** Stations with room first, of these the ones that keep what the jars are to have, then the nearest in temperature. */
export function targetsFor<T extends Target & { isActive: boolean; free: number }>(
  jars: readonly MovableJar[],
  fromId: string,
  stations: readonly T[],
): { station: T; keeps: boolean; hasRoom: boolean }[] {
  return stations
    .filter((station) => station.isActive && station.id !== fromId)
    .map((station) => ({
      station,
      keeps: jars.every((jar) => differenceOf(askedOf(jar), keepsOf(station)) === null),
      hasRoom: station.free >= jars.length,
    }))
    .toSorted(
      (a, b) =>
        Number(b.hasRoom) - Number(a.hasRoom) ||
        Number(b.keeps) - Number(a.keeps) ||
        awayFrom(jars, a.station) - awayFrom(jars, b.station) ||
        b.station.free - a.station.free,
    )
}

function awayFrom([jar]: readonly MovableJar[], { temperatureC }: Target): number {
  if (jar?.temperatureC == null || temperatureC === null) return Number.MAX_VALUE
  return Math.abs(jar.temperatureC - temperatureC)
}
