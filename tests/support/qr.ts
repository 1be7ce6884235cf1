/**
 * Reads a QR symbol of version 1 from its modules as ISO/IEC 18004 lays them out: format information, mask, codewords
 * in their zigzag, segments of digits and alphanumeric ones. Written from the standard's figures and on its own, so that it does not share
 * a mistake with what drew the symbol. Damage is not corrected: a printed file has none.
 */
export function readQr(dark: boolean[][]): string {
  if (dark.length !== 21) throw new Error(`${dark.length} modules, not 21`)
  finders.forEach(([x, y]) => expectFinder(dark, x, y))
  const mask = maskOf(dark)
  const bits: number[] = []
  let isUp = true
  for (let right = 20; right > 0; right -= 2) {
    // The vertical timing pattern has no pair of its own.
    if (right === 6) right = 5
    for (let step = 0; step < 21; step++) {
      const y = isUp ? 20 - step : step
      for (const x of [right, right - 1]) {
        if (isFunction(x, y)) continue
        bits.push((dark[y]![x] ? 1 : 0) ^ (mask(y, x) ? 1 : 0))
      }
    }
    isUp = !isUp
  }
  return segments(bits)
}

const finders = [
  [0, 0],
  [14, 0],
  [0, 14],
] as const

function expectFinder(dark: boolean[][], left: number, top: number): void {
  for (let y = 0; y < 7; y++) {
    for (let x = 0; x < 7; x++) {
      const ring = Math.max(Math.abs(x - 3), Math.abs(y - 3))
      if (dark[top + y]![left + x] !== (ring !== 2)) throw new Error(`no finder at ${left}, ${top}`)
    }
  }
}

/** Finders with their separators and the format information beside them, and both timing patterns. */
function isFunction(x: number, y: number): boolean {
  return (x < 9 && y < 9) || (x > 12 && y < 9) || (x < 9 && y > 12) || x === 6 || y === 6
}

/** Fifteen bits around the upper left finder, under their own mask 101010000010010; H is 10. */
function maskOf(dark: boolean[][]): (row: number, column: number) => boolean {
  const at = [
    ...[0, 1, 2, 3, 4, 5, 7, 8].map((x) => dark[8]![x]),
    ...[7, 5, 4, 3, 2, 1, 0].map((y) => dark[y]![8]),
  ]
  const format = parseInt(at.map((bit) => (bit ? '1' : '0')).join(''), 2) ^ 0b101010000010010
  if (format >> 13 !== 0b10) throw new Error('the correction is not H')
  return masks[(format >> 10) & 0b111]!
}

const masks: ((i: number, j: number) => boolean)[] = [
  (i, j) => (i + j) % 2 === 0,
  (i) => i % 2 === 0,
  (_, j) => j % 3 === 0,
  (i, j) => (i + j) % 3 === 0,
  (i, j) => (Math.floor(i / 2) + Math.floor(j / 3)) % 2 === 0,
  (i, j) => ((i * j) % 2) + ((i * j) % 3) === 0,
  (i, j) => (((i * j) % 2) + ((i * j) % 3)) % 2 === 0,
  (i, j) => (((i + j) % 2) + ((i * j) % 3)) % 2 === 0,
]

/** Data codewords of version 1 at correction H, in bits. */
const dataBits = 72

/** A code of digits alone, or one that ends in many, is written in digits where that is shorter. */
function segments(bits: number[]): string {
  let at = 0
  let text = ''
  const take = (count: number) => {
    const value = parseInt(bits.slice(at, at + count).join(''), 2)
    at += count
    return value
  }
  while (at + 4 <= dataBits) {
    const mode = take(4)
    if (mode === 0) break
    if (mode === 0b0001) text += digits(take, take(10))
    else if (mode === 0b0010) text += alphanumeric(take, take(9))
    else throw new Error(`mode ${mode} is neither digits nor alphanumeric`)
  }
  return text
}

function digits(take: (count: number) => number, length: number): string {
  let text = ''
  for (let left = length; left > 0; left -= 3) {
    const group = Math.min(left, 3)
    text += String(take([0, 4, 7, 10][group]!)).padStart(group, '0')
  }
  return text
}

function alphanumeric(take: (count: number) => number, length: number): string {
  let text = ''
  while (text.length + 1 < length) {
    const pair = take(11)
    text += letters[Math.floor(pair / 45)]! + letters[pair % 45]!
  }
  return text.length < length ? text + letters[take(6)]! : text
}
const letters = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ $%*+-./:'
