import {
  converter,
  formatHex,
  type Color,
  type Rgb,
  differenceCiede2000,
  filterDeficiencyDeuter,
  filterDeficiencyProt,
  filterDeficiencyTrit,
  wcagContrast,
} from 'culori'
import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'

const toRgb = converter('rgb')
const css = readFileSync('app/globals.css', 'utf8')

function tokensOf(theme: 'light' | 'dark' | 'dim'): Record<string, string> {
  if (theme === 'dim') {
    const [, block] = css.match(/\[data-theme='dim'\] \{([^}]*)\}/)!
    return Object.fromEntries(
      [...block!.matchAll(/--(\w+): (#[0-9a-f]{6});/g)].map(([, name, hex]) => [name, hex]),
    )
  }
  const pairs = css.matchAll(/--(\w+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)
  return Object.fromEntries(
    [...pairs].map(([, name, light, dark]) => [name, theme === 'light' ? light : dark]),
  )
}

// WCAG 2.2 AA: 4.5 for text (1.4.3), 3 for the edges of controls and for drawings one must tell apart (1.4.11).
const text: [string, string[]][] = [
  ['ink', ['ground', 'recess', 'paper', 'typed', 'wash']],
  ['soft', ['ground', 'recess', 'paper', 'typed', 'wash']],
  ['alarm', ['ground', 'recess', 'paper', 'typed', 'wash']],
  ['onink', ['ink', 'alarm']],
]
const edges: [string, string[]][] = [
  ['ink', ['ground', 'recess', 'paper', 'typed', 'wash']],
  ['rule', ['ground', 'recess', 'paper', 'typed']],
  ['alarm', ['ground', 'recess', 'paper', 'typed', 'wash']],
  ['water', ['cream']],
  ['dot', ['oil']],
  ['dot', ['cream']],
]

function seenThrough(filter: (colour: Rgb) => Color) {
  return (hex: string): string => formatHex(filter(toRgb(hex)!))
}

describe.each(['light', 'dark', 'dim'] as const)('the %s theme', (theme) => {
  const token = tokensOf(theme)

  function contrast(front: string, back: string): number {
    const pair = [token[front], token[back]]
    if (!pair[0] || !pair[1]) throw new Error(`${front} or ${back} is no token of app/globals.css`)
    return wcagContrast(pair[0], pair[1])
  }

  it.each(text.flatMap(([front, backs]) => backs.map((back) => [front, back] as const)))(
    '%s can be read on %s',
    (front, back) => expect(contrast(front, back)).toBeGreaterThanOrEqual(4.5),
  )

  it.each(edges.flatMap(([front, backs]) => backs.map((back) => [front, back] as const)))(
    '%s can be told from %s',
    (front, back) => expect(contrast(front, back)).toBeGreaterThanOrEqual(3),
  )

  const eyes = [
    ['every cone', (hex: string) => hex],
    ['no long cone', seenThrough(filterDeficiencyProt(1))],
    ['no middle cone', seenThrough(filterDeficiencyDeuter(1))],
    ['no short cone', seenThrough(filterDeficiencyTrit(1))],
  ] as const

  it.each(eyes)('water, oil and alarm are at least 20 apart for an eye with %s', (_, see) => {
    const difference = differenceCiede2000()
    for (const [one, other] of [
      ['water', 'oil'],
      ['water', 'alarm'],
      ['oil', 'alarm'],
    ] as const) {
      const apart = difference(see(token[one]!)!, see(token[other]!)!)
      expect(apart, `${one} and ${other}`).toBeGreaterThanOrEqual(20)
    }
  })
})
