import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isJarCode, jarCode, jarCodes, namedJar, readJarCode } from '@/lib/jar/rules/code'
import { missedBecause } from '@/lib/jar/rules/mishap'

const alphabet = '23456789CDFHJKMNPRTVWXY'
const code = fc.integer({ min: 0, max: 2 ** 31 - 1 }).map((seed) => {
  let state = (seed % 2147483646) + 1
  return jarCode(() => (state = (state * 16807) % 2147483647) / 2147483647)
})

describe('codes of jars', () => {
  it('are five characters that no gloved hand confuses', () => {
    fc.assert(
      fc.property(code, (made) => {
        expect(made).toMatch(/^[23456789CDFHJKMNPRTVWXY]{5}$/)
        expect(isJarCode(made)).toBe(true)
      }),
    )
  })

  it('catch every single wrong character', () => {
    fc.assert(
      fc.property(code, fc.nat(4), fc.nat(alphabet.length - 1), (made, place, other) => {
        const wrong = made.slice(0, place) + alphabet[other] + made.slice(place + 1)
        expect(isJarCode(wrong)).toBe(wrong === made)
      }),
    )
  })

  it('catch every swap of two characters', () => {
    fc.assert(
      fc.property(code, fc.nat(4), fc.nat(4), (made, a, b) => {
        const letters = [...made]
        ;[letters[a], letters[b]] = [letters[b]!, letters[a]!]
        const swapped = letters.join('')
        expect(isJarCode(swapped)).toBe(swapped === made)
      }),
    )
  })

  it('are read in small letters, with spaces, dots, a station before them or as the end of an address', () => {
    fc.assert(
      fc.property(code, (made) => {
        const small = made.toLowerCase()
        for (const typed of [
          ` ${small} `,
          small.split('').join(' '),
          `${small.slice(0, 3)}.${small.slice(3)}`,
          `45·${made}`,
          `−10·${made}`,
          `5.${small}`,
          `FT·${made}`,
          `http://lab.example/bench/${made}`,
        ]) {
          expect(readJarCode(typed)).toBe(made)
        }
      }),
    )
  })

  it('are null where the text is no code', () => {
    for (const text of ['', '45', 'J4', 'AAAAA', '22222 2', 'O0O0O', '45·', '<script>', 'J4PC7J4PC7']) {
      expect(readJarCode(text)).toBeNull()
    }
  })

  it('differ from each other within one draw', () => {
    const codes = jarCodes(400, Math.random)
    expect(new Set(codes).size).toBe(400)
  })

  it('are named with the station they belong to', () => {
    expect(namedJar('J4PC7', { temperatureC: 45, isFreezeThaw: false })).toBe('45·J4PC7')
    expect(namedJar('J4PC7', { temperatureC: -10, isFreezeThaw: false })).toBe('−10·J4PC7')
    expect(namedJar('J4PC7', { temperatureC: null, isFreezeThaw: true })).toBe('FT·J4PC7')
    expect(namedJar('J4PC7', null)).toBe('J4PC7')
  })
})

describe('why a jar was not read', () => {
  it.each([
    ['broken', 'broken', 'broken'],
    ['broken', 'fell off the tray', 'broken: fell off the tray'],
    ['wrong jar', 'opened by mistake', 'opened by mistake'],
    ['lost', 'not in its place', 'lost: not in its place'],
    ['missed', 'ran out of time', 'ran out of time'],
  ] as const)('%s because "%s" is said once: %s', (kind, reason, said) => {
    expect(missedBecause({ kind, reason })).toBe(said)
  })
})
