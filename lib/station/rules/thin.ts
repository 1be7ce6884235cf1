type Entry = { measuredAt: string; temperatureC: number }

/** For drawing only: of each step the least and the most are kept, in their order, so that no excursion is lost. */
export function thinned<E extends Entry>(log: readonly E[], steps: number): E[] {
  if (log.length <= steps * 2) return [...log]
  const size = Math.ceil(log.length / steps)
  const kept: E[] = []
  for (let at = 0; at < log.length; at += size) {
    const part = log.slice(at, at + size)
    const low = part.reduce((a, b) => (b.temperatureC < a.temperatureC ? b : a))
    const high = part.reduce((a, b) => (b.temperatureC > a.temperatureC ? b : a))
    kept.push(...(low === high ? [low] : part.indexOf(low) < part.indexOf(high) ? [low, high] : [high, low]))
  }
  return kept
}
