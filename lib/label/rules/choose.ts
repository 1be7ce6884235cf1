import type { JarRow } from '@/lib/jar/queries/jars'
import { readJarCode } from '@/lib/jar/rules/code'
import type { LabelChoice } from '../schema'
import { labelsPerSheet, type LabelGrid } from './grid'

/** What was opened at the start is gone and needs no label. */
export function labelledJars<T extends Pick<JarRow, 'state'>>(jars: T[]): T[] {
  return jars.filter((jar) => jar.state !== 'spent' && jar.state !== 'lost')
}

/** The jars whose labels are asked for; the fault says a code that is none, or of another study. */
export function chooseJars<
  T extends Pick<JarRow, 'code' | 'state' | 'studyStationId'> & { isMoved: boolean },
>(jars: T[], { of, jars: typed }: Pick<LabelChoice, 'of' | 'jars'>): { chosen: T[]; fault: string | null } {
  const standing = labelledJars(jars)
  if (of === 'all') return found(standing)
  if (of === 'retains') return found(standing.filter((jar) => jar.studyStationId === null))
  if (of === 'moved') return found(standing.filter((jar) => jar.isMoved))
  if (of !== 'jars') return found(standing.filter((jar) => jar.studyStationId === of))
  const texts = typed.split(/[\s,;]+/).filter((text) => text !== '')
  const codes = texts.map((text) => ({ text, code: readJarCode(text) }))
  const wrong = codes.find(({ code }) => code === null)
  if (wrong) {
    return {
      chosen: [],
      fault: `${wrong.text.slice(0, 20)} is no jar code. Read the label again: five characters.`,
    }
  }
  const strange = codes.find(({ code }) => !standing.some((jar) => jar.code === code))
  if (strange) {
    return { chosen: [], fault: `No jar of this study that still stands has the code ${strange.code}.` }
  }
  return found(standing.filter((jar) => codes.some(({ code }) => code === jar.code)))
}

function found<T>(chosen: T[]): { chosen: T[]; fault: string | null } {
  return { chosen, fault: chosen.length === 0 ? 'No jar is chosen whose label could be printed.' : null }
}

/** Labels on their sheets: the first sheet may be begun, the others are whole. */
export function sheetsOf<T>(items: T[], grid: LabelGrid, first: number): { index: number; item: T }[][] {
  const whole = labelsPerSheet(grid)
  const begin = Math.min(Math.max(first, 1), whole) - 1
  const sheets: { index: number; item: T }[][] = []
  items.forEach((item, at) => {
    const place = begin + at
    const sheet = Math.floor(place / whole)
    sheets[sheet] = [...(sheets[sheet] ?? []), { index: place % whole, item }]
  })
  return sheets
}
