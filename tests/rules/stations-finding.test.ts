import { describe, expect, it } from 'vitest'
import { stationsFinding } from '@/lib/station/rules/finding'

const oven = (name: string, lastC: number | null, isActive = true) => ({
  ...{ name, isActive, lowC: 43, highC: 47, lastC },
})
const said = (...stations: ReturnType<typeof oven>[]) => {
  const { strong, rest, sentence } = stationsFinding(stations)
  return [`${strong}${rest}`, sentence]
}

describe('the headline of the list of stations says no more than was read', () => {
  it('praises nothing that was never read', () => {
    expect(said(oven('Oven 1', null), oven('Oven 2', null))).toEqual([
      'No station has been read yet',
      'Until a temperature is logged, what the jars there go through is not known.',
    ])
    expect(said(oven('Oven 1', 45), oven('Oven 2', null), oven('Oven 3', null))).toEqual([
      'One of 3 stations was inside its limits when last read',
      'Two stations were never read; what jars there went through is not known.',
    ])
  })

  it('says every station only where every one in use was read and is inside', () => {
    expect(said(oven('Oven 1', 45), oven('Oven 2', 47))[0]).toBe(
      'Every station was inside its limits when last read',
    )
    expect(said(oven('Oven 1', 45), oven('Oven 2', 52, false))[0]).toBe(
      'Every station was inside its limits when last read',
    )
  })

  it('names what is outside first, and what was never read after it', () => {
    expect(said(oven('Oven 1', 51), oven('Oven 2', null))).toEqual([
      'One of 2 stations is outside its limits',
      'Oven 1: look at the record, then at the jars. One station was never read; what jars there went through is not known.',
    ])
  })

  it('has words for a lab without stations, and for one with none in use', () => {
    expect(said()[0]).toBe('No station is here yet')
    expect(said(oven('Oven 1', 45, false))[0]).toBe('No station is in use')
  })
})
