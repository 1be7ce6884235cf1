import { readPasted } from '../../formula/rules/paste'
import { emptyLine, grouped } from '../../formula/rules/arrange'
import { formulaChecks } from '../../formula/rules/checks'
import { formulaFinding } from '../../formula/rules/finding'
import { begin, record, type History } from '../../formula/rules/history'
import { formulaTotals, phaseTotals } from '../../formula/rules/totals'
import { readAmounts, remainderOf, type TypedLine } from '../../formula/rules/typed'
import { findTwice } from '../../formula/rules/twice'
import { median } from '../../science/mean'
import { atMost, meanSeconds, plain, type Figure } from './figure'

const milliseconds = (ms: number) => `${ms.toFixed(2)} ms`
const lineCount = 200
/** One frame of a screen that draws sixty a second. */
const target = 16

/** What a keystroke makes anew in a formula as long as they come, and how long a pasted block takes to be read. */
export function benchFormula(): Figure[] {
  const block = pastedBlock()
  const pasteTimes = timesOf(20, () => readPasted(block))
  const pasted = readPasted(block)
  if (pasted?.kind !== 'lines' || pasted.lines.length !== lineCount)
    throw new Error('the block of the benchmark was not read as 200 lines')
  const lines = grouped(
    pasted.lines.map((line, index) => ({
      ...emptyLine(`line ${index}`, line.phase, line.phase !== 'A'),
      ...{ inciName: line.inciName, function: line.function, percent: line.percent },
      ...{ density: line.density, price: line.price, isRemainder: index === lineCount - 1 },
    })),
  )
  let history = begin(lines)
  let stroke = 0
  const key = () => {
    history = type(history, stroke++)
    recompute(history.now)
  }
  const strokeTimes = timesOf(300, key)
  const rounds = Array.from({ length: 10 }, () => 1000 * meanSeconds(30, key))
  const totals = formulaTotals(readAmounts(history.now))
  return [
    plain('formula of the benchmark', `${lineCount} lines, total ${totals.totalThousandths / 1000} %`),
    atMost('reading the pasted block, slowest of 20', Math.max(...pasteTimes), 50, milliseconds),
    plain('a keystroke recomputed, median and slowest of 300 by the clock', slowest(strokeTimes)),
    atMost('a keystroke recomputed, worst of ten means of 30', Math.max(...rounds), target, milliseconds),
  ]
}

/** Twelve phases, tabs, decimal commas, prices and a head row, as a spreadsheet hands it over. */
function pastedBlock(): string {
  const rows = Array.from({ length: lineCount }, (_, index) => {
    const phase = 'ABCDEFGHIJKL'[Math.floor((index * 12) / lineCount)]
    const share = index === lineCount - 1 ? 'q.s.' : `0,${(40 + (index % 7)).toString()}`
    const density = `${(0.8 + (index % 40) / 100).toFixed(3)}`.replace('.', ',')
    return [phase, `Ingredient ${index}/Copolymer`, 'emulsifier', share, density, `${index},50`].join('\t')
  })
  return ['Phase\tINCI name\tFunction\t% w/w\tDensity\tPrice per kg', ...rows].join('\r\n')
}

/** One more digit in one of the cells, each time in another line. */
function type(history: History<TypedLine[]>, stroke: number): History<TypedLine[]> {
  const at = (stroke * 37) % (lineCount - 1)
  const next = history.now.map((line, index) =>
    index === at ? { ...line, percent: `0,${10 + (stroke % 80)}` } : line,
  )
  return record(history, next, `${at}`)
}

/** Everything that the page works out between the key and the picture: React's own drawing is not in it. */
function recompute(lines: TypedLine[]): void {
  const amounts = readAmounts(lines)
  const totals = formulaTotals(amounts)
  phaseTotals(amounts)
  const checks = formulaChecks('water-in-oil', amounts, [])
  formulaFinding('water-in-oil', totals, checks)
  findTwice(lines)
  remainderOf(lines)
  // As it is kept on the device at every keystroke.
  JSON.stringify(lines)
}

function timesOf(rounds: number, work: () => void): number[] {
  for (let i = 0; i < 10; i++) work()
  return Array.from({ length: rounds }, () => {
    const begun = performance.now()
    work()
    return performance.now() - begun
  }).sort((a, b) => a - b)
}

const slowest = (sorted: number[]) => `${milliseconds(median(sorted))}, ${milliseconds(sorted.at(-1) ?? 0)}`
