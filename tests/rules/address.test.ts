import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readablePath, readSegment } from '@/lib/address/rules'

describe('an address that comes in', () => {
  it('is as it came where it can be read, and where it cannot each percent sign is meant as itself', () => {
    for (const address of ['/', '/bench/K7R2M', '/batches/A%20B%2FC?q=%ff#x', '*', ''])
      expect(readablePath(address)).toBe(address)
    expect(readablePath('/studies/%ff/a%20b?to=%ff')).toBe('/studies/%25ff/a%20b?to=%ff')
    expect(readablePath('/bench/%E0%A4%A')).toBe('/bench/%25E0%25A4%25A')
    expect(readablePath('/bench/A%00')).toBe('/bench/A%2500')
  })

  it('can be read whatever was sent', () => {
    const sent = fc.string({
      unit: fc.constantFrom('%', '0', 'f', 'E', 'a', '/', '?', '#', '%00', '%ff', 'é'),
    })
    fc.assert(
      fc.property(sent, (tail) => {
        const [path] = readablePath(`/${tail}`).split(/[?#]/)
        for (const segment of path!.split('/')) expect(decodeURIComponent(segment)).not.toContain('\0')
      }),
    )
  })

  it('is said as it is written where it cannot be read', () => {
    expect([readSegment('A%20B'), readSegment('%zz'), readSegment('%00')]).toEqual(['A B', '%zz', '%00'])
  })
})
