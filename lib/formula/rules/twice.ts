import { percentText } from './numbers'
import { readScaled } from '@/lib/number/rules'
import type { TypedLine } from './typed'

/** An ingredient that stands more than once in a phase, by the ids of its lines. */
export type Twice = { phase: string; inciName: string; ids: string[] }

export function findTwice(lines: readonly TypedLine[]): Twice[] {
  const found = new Map<string, Twice>()
  for (const { id, phase, inciName } of lines) {
    const name = inciName.trim().replace(/\s+/g, ' ')
    if (!name) continue
    const key = `${phase} ${name.toLowerCase()}`
    const one = found.get(key)
    if (one) one.ids.push(id)
    else found.set(key, { phase, inciName: name, ids: [id] })
  }
  return [...found.values()].filter((one) => one.ids.length > 1)
}

/** One line in place of several, with their shares added; null where a share cannot be read. */
export function joinLines(lines: readonly TypedLine[], ids: readonly string[]): TypedLine[] | null {
  const own = lines.filter((line) => ids.includes(line.id))
  const kept = own.find((line) => line.isRemainder) ?? own[0]
  const shares = own.filter((line) => !line.isRemainder).map((line) => readScaled(line.percent || '0', 3))
  if (!kept || shares.some((share) => share === null)) return null
  const percent = kept.isRemainder ? '' : percentText(shares.reduce<number>((sum, share) => sum + share!, 0))
  return lines
    .filter((line) => line.id === kept.id || !ids.includes(line.id))
    .map((line) => (line.id === kept.id ? { ...line, percent } : line))
}
