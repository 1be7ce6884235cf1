import { describe, expect, it } from 'vitest'
import { judge } from '@/lib/cli/photo-check/judge'
import { ScienceError } from '@/lib/science/guard'
import { proposeLines } from '@/lib/science/photo-layers/propose'

// Truth: photos drawn by lib/cli/photo-check, which shares no code with the proposal. `npm run photo-check` draws hundreds.

describe('lines proposed on a photo', () => {
  const judged = Array.from({ length: 12 }, (_, i) => judge(5020 + i, 640))
  const clear = judged.filter((one) => !one.isOpaque)

  it('lie within 1.5 points of fill height in nine of ten small drawn photos, or are said not to be sure', () => {
    const near = clear.filter(({ worst }) => worst !== null && worst <= 1.5)
    expect(near.length / clear.length).toBeGreaterThanOrEqual(0.9)
    expect(clear.filter(({ worst, sureness }) => sureness === 'sure' && (worst ?? 99) > 1.5)).toEqual([])
  })

  it('are none where the picture is even, or noise, or too small for its sides', () => {
    const even = {
      width: 90,
      height: 120,
      channels: 3 as const,
      data: new Uint8Array(90 * 120 * 3).fill(128),
    }
    expect(proposeLines(even)).toMatchObject({ sureness: 'look again', lines: null })
    const noise = { ...even, data: even.data.map((_, i) => (i * 7919) % 251) }
    expect(proposeLines(noise).sureness).not.toBe('sure')
    expect(() => proposeLines({ ...even, height: 200 })).toThrow(ScienceError)
  })
})
