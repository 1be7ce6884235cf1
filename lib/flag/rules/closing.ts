/** What is out at a station that decides fails the prototype: QA alone closes it. */
export function needsQuality(flag: { level: string; voice: string | null }): boolean {
  return flag.level === 'out' && flag.voice === 'decides'
}
