import { spokenDay } from '@/lib/study/rules/calendar'
import { namedJar } from './code'

export type JarAtHand = {
  code: string
  kind: 'watch' | 'measuring' | 'spare' | 'retain'
  state: 'stored' | 'pulled' | 'resting' | 'spent' | 'kept' | 'lost'
  setAsideFor: string | null
  studyCode: string
  studyTitle: string
  studyState: string
  batchCode: string
  stationName: string | null
  temperatureC: number | null
  isFreezeThaw: boolean | null
  shelf: number | null
  place: number | null
  /** Its next day, where one is planned. */
  dueOn: string | null
  /** Why it is read no more. */
  mishap: { kind: string; on: string } | null
}

/** Which jar is in hand, where it belongs, and why nothing is asked of it: a wrong jar goes back to its place. */
export function whyNotToRead(jar: JarAtHand): string {
  const station =
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw }
  const is = `Jar ${namedJar(jar.code, station)} is ${kinds[jar.kind]} of batch ${jar.batchCode} in study ${jar.studyCode}, ${jar.studyTitle}`
  return `${is}. ${sentence(standsOf(jar))}`
}

/** "on shelf 2, place 41 of Oven 3"; null where it stands at no station. */
export function placeOf({
  stationName,
  shelf,
  place,
}: Pick<JarAtHand, 'stationName' | 'shelf' | 'place'>): string | null {
  if (stationName === null) return null
  return shelf === null ? `in ${stationName}` : `on shelf ${shelf}, place ${place} of ${stationName}`
}

const kinds = { watch: 'a watch jar', measuring: 'a measuring jar', spare: 'a spare', retain: 'a retain jar' }

function standsOf(jar: JarAtHand): string {
  if (jar.state === 'lost')
    return `it was noted as ${jar.mishap?.kind === 'broken' ? 'broken' : 'lost'}${onDay(jar)}`
  if (jar.state === 'spent')
    return jar.mishap ? `it was opened by mistake${onDay(jar)} and is spent` : 'it was opened and is spent'
  const place = placeOf(jar)
  const belongs =
    place !== null
      ? `it belongs ${place}`
      : jar.kind === 'retain'
        ? 'it belongs in the retain cupboard'
        : 'it stands at no station'
  return `${belongs}${askedOf(jar)}`
}

function askedOf(jar: JarAtHand): string {
  if (jar.studyState !== 'running') return `; the study is ${jar.studyState}, and nothing more is asked of it`
  if (jar.dueOn !== null) return `, and is due next on ${spokenDay(jar.dueOn)}`
  if (jar.kind === 'spare') return ', and is read only where a repeat or a missing jar calls for it'
  if (jar.kind === 'retain')
    return jar.setAsideFor ? `, set aside for ${jar.setAsideFor}` : ', and is kept unopened'
  return ', and nothing more is asked of it'
}

function onDay({ mishap }: JarAtHand): string {
  return mishap ? ` on ${spokenDay(mishap.on)}` : ''
}

function sentence(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`
}
