import { refuse } from '@/lib/http/errors'
import { spokenDay } from '@/lib/study/rules/calendar'
import type { AskedOfJar, JarOfMishap } from '../queries/of-mishap'
import type { JarMishap, MishapKind } from '../schema'

/** The line of the pull that it is about; null where the jar alone is. */
export function refuseMishap(jar: JarOfMishap, { kind, pull }: JarMishap): AskedOfJar | null {
  if (jar.studyState === 'closed') {
    throw refuse.conflict(`Study ${jar.studyCode} is closed, so nothing more is noted of jar ${jar.code}.`)
  }
  if (pull === null) return refuseJar(jar, kind)
  const asked = jar.asked.find((one) => one.id === pull.pullJarId)
  if (!asked) throw refuse.notFound('There is no such jar in a pull.')
  if (asked.state === 'done' || asked.state === 'missed') {
    const what = asked.state === 'done' ? 'read already' : 'marked as not read already'
    throw refuse.conflict(`Jar ${jar.code} was ${what}. Reload to see what is on record.`)
  }
  if (asked.version !== pull.version) {
    throw refuse.stale(
      `Jar ${jar.code} has moved on since you opened it: somebody opened it, took it out or read a part. Reload, look, then note it again.`,
      { version: asked.version, state: asked.state },
    )
  }
  if (kind === 'missed' && asked.isRead) {
    throw refuse.conflict(
      `A part of jar ${jar.code} is on record for ${asked.label}. Close it instead, leaving out the rest.`,
    )
  }
  if (kind === 'pulled early' && asked.windowFrom <= jar.today) {
    throw refuse.conflict(
      `The window of jar ${jar.code} is open since ${spokenDay(asked.windowFrom)}, so it is not early. Read it.`,
    )
  }
  return asked
}

function refuseJar(jar: JarOfMishap, kind: MishapKind): null {
  if (kind === 'missed' || kind === 'pulled early') {
    const sentence = 'Say in which pull this was.'
    throw refuse.invalid(sentence, { pull: sentence })
  }
  if (jar.state === 'spent' || jar.state === 'lost') {
    throw refuse.conflict(`Jar ${jar.code} is ${jar.state} already; nothing more happens to it.`)
  }
  return null
}

/** A jar that is merely not read goes back to its place. */
export function stateAfter(jar: Pick<JarOfMishap, 'state'>, kind: MishapKind): string {
  if (kind === 'broken' || kind === 'lost') return 'lost'
  if (kind === 'wrong jar') return 'spent'
  return jar.state === 'resting' || jar.state === 'pulled' ? 'stored' : jar.state
}

/** One of them as the study's sheet tells it; what happened is said by its kind, why by the reason. */
export type Mishap = { kind: MishapKind; code: string; reason: string; by: string; at: string }

const deeds: Record<MishapKind, string> = {
  missed: 'not read',
  broken: 'broken',
  lost: 'lost',
  'wrong jar': 'opened by mistake',
  'pulled early': 'pulled early',
}

export function mishapText({ kind, code, reason, by }: Mishap, day: string): string {
  return `Jar ${code} ${deeds[kind]}, ${day}, ${by}: ${reason}`
}

const prefixes: Partial<Record<MishapKind, string>> = {
  broken: 'broken: ',
  lost: 'lost: ',
  'wrong jar': 'opened by mistake: ',
}

/** As the sheet, the case and the report say why there is no reading. */
export function missedBecause({ kind, reason }: Pick<JarMishap, 'kind' | 'reason'>): string {
  // The jar's screen offers "broken" as the reason itself.
  const prefix = prefixes[kind] ?? ''
  return prefix === `${reason.toLowerCase()}: ` ? reason : `${prefix}${reason}`
}
