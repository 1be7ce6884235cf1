import { describe, expect, it } from 'vitest'
import { fromZod } from '@/lib/http/respond'
import { readTyped } from '@/lib/number/rules'
import { newStation } from '@/lib/station/schema'

const station = (typed: Record<string, unknown>) =>
  newStation.safeParse({
    ...{ id: '01a23379-9f46-74e2-bd2d-43f1bf7a8f5c', name: 'Oven 9', kind: 'temperature' },
    ...{ temperatureC: 45, lowC: 43, highC: 47, walkOrder: 1, shelves: 4, placesPerShelf: 20 },
    ...typed,
  })
const told = (typed: Record<string, unknown>) => fromZod(station(typed).error!)

describe('a number as it is typed', () => {
  it('is read with comma or point, is nothing where nothing stands, and is never dropped where it cannot be read', () => {
    expect([readTyped('47,5'), readTyped('47.5'), readTyped('  '), readTyped('47x')]).toEqual([
      47.5,
      47.5,
      null,
      '47x',
    ])
    expect(station({ highC: readTyped('') }).success).toBe(true)
    expect(told({ highC: readTyped('47x') }).fields).toEqual({ highC: 'Type a number here.' })
  })

  it('that no count can be is refused without the machine’s own limits', () => {
    for (const shelves of [-1e20, 1e20, 1.5])
      expect(told({ shelves }).fields!['shelves']).toMatch(/^(That is too (small|large)|Type a whole number)/)
  })

  it('is named at its place, and the sentence below does not say what the field is called in code', () => {
    expect(told({ temperatureC: -300, lowC: null }).message).toBe('That is below absolute zero.')
    expect(told({ temperatureC: -300, lowC: null, shelves: 0 }).message).toBe(
      'That is below absolute zero. 1 more like it.',
    )
  })
})
