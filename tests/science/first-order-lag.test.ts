import { describe, expect, it } from 'vitest'
import { separationCurve } from '@/lib/science/separation-curve'

describe('a separation curve that rises between two pulls', () => {
  const t = [0, 1, 2, 3, 4, 6, 8, 10, 12]
  const percent = [0, 0, 0, 0, 0.2, 1.5, 22.6, 27.8, 28.1]

  it('is fitted at the least of its several minima', () => {
    // R 4.2.2, nls(algorithm = "port") and optim() from S = 28.7, k = 0.76, t0 = 5.93; the default nls from most other
    // starts ends at S = 28.118, residual SD 0.618, the minimum whose lag lies in the next gap.
    const found = separationCurve({ t, percent })
    expect(found.model).toBe('first order after a lag')
    expect(found.plateau).toBeCloseTo(28.6749088, 6)
    expect(found.rate).toBeCloseTo(21.824616, 5)
    expect(found.residualSd).toBeCloseTo(0.231668894, 8)
  })

  it('does not know the unit of time', () => {
    const weeks = separationCurve({ t, percent })
    const days = separationCurve({ t: t.map((time) => time * 7), percent })
    expect(days.rate! * 7).toBeCloseTo(weeks.rate!, 6)
    expect(days.residualSd).toBeCloseTo(weeks.residualSd, 9)
  })
})
