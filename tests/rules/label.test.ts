import { describe, expect, it } from 'vitest'
import { labelShapes } from '@/components/jar/label-shapes'
import { qrOf } from '@/components/jar/qr'
import type { JarRow } from '@/lib/jar/queries/jars'
import { jarCodes } from '@/lib/jar/rules/code'
import { renderLabels } from '@/lib/label/document'
import { chooseJars, sheetsOf } from '@/lib/label/rules/choose'
import { genericGrids, labelPlace, papers, type LabelGrid } from '@/lib/label/rules/grid'
import { fitLine, gridFaults, labelLayout } from '@/lib/label/rules/layout'
import { labelWords } from '@/lib/label/rules/lines'
import { labelChoice, labelGrid } from '@/lib/label/schema'
import { drawnSquares } from '@/tests/support/drawn-squares'
import { pdfContents, pdfText } from '@/tests/support/pdf-text'
import { readQr } from '@/tests/support/qr'

const pt = 72 / 25.4
let seed = 7
const random = () => (seed = (seed * 16_807) % 2_147_483_647) / 2_147_483_647
const codes = jarCodes(30, random)
const long = 'Klimaschrank für die beschleunigte Lagerung, Keller Süd, hinten links'
const jar = (code: string, more: Partial<JarRow> = {}) =>
  ({
    id: code,
    code,
    kind: 'measuring',
    state: 'stored',
    shelf: 2,
    place: 14,
    setAsideFor: null,
    studyCode: 'S-123456',
    batchCode: 'WWWWWWWWWWMMMMMMMMMM-12345',
    startedOn: '2026-11-30',
    studyStationId: '0190aaaa-0000-7000-8000-000000000001',
    temperatureC: -10,
    isFreezeThaw: false,
    variant: 'in light, wrapped in foil, inverted, own pack',
    stationName: long,
    isMoved: false,
    ...more,
  }) as JarRow & { isMoved: boolean }
const labels = (jars = codes.map((code) => jar(code)), ownGrid: LabelGrid | null = null) => ({
  code: 'S-123456',
  ownPack: 'airless pump, 30 mL',
  jars,
  ownGrid,
})

describe('label sheets of choice', () => {
  it.each(genericGrids)('$key fits its sheet, and its square can be read', ({ grid }) => {
    expect(gridFaults(grid)).toEqual([])
    const last = labelPlace(grid, grid.columns * grid.rows - 1)
    expect(last.xMm + grid.widthMm).toBeLessThanOrEqual(papers[grid.paper].widthMm + 0.01)
    expect(last.yMm + grid.heightMm).toBeLessThanOrEqual(papers[grid.paper].heightMm + 0.01)
    // Five dots at 300 dpi are 0.42 mm [DENSO WAVE, qrcode.com, "Point for setting the module size"].
    expect(labelLayout(grid)!.moduleMm).toBeGreaterThanOrEqual((5 * 25.4) / 300 - 0.004)
    const { square, text } = labelLayout(grid)!
    for (const box of [square, text]) expect(box.xMm >= 0 && box.yMm >= 0).toBe(true)
    expect(square.xMm + square.sideMm).toBeLessThanOrEqual(grid.widthMm)
    expect(square.yMm + square.sideMm).toBeLessThanOrEqual(grid.heightMm)
    expect(text.xMm + text.widthMm).toBeLessThanOrEqual(grid.widthMm)
  })

  it('a lab’s own sheet is refused where it does not fit or could not be read', () => {
    const own = { ...genericGrids[0]!.grid }
    const said = (grid: LabelGrid) => labelGrid.safeParse(grid).error?.issues.map((issue) => issue.message)
    expect(said(own)).toBeUndefined()
    expect(said({ ...own, widthMm: 70 })).toEqual([
      'The columns reach 222.25 mm, and A4 is 210 mm wide. Make labels, gaps or the margin smaller.',
    ])
    expect(said({ ...own, paper: 'Letter' })).toEqual([
      'The rows reach 281.85 mm, and US Letter is 279.4 mm high. Make labels, gaps or the margin smaller.',
    ])
    expect(said({ ...own, heightMm: 12.7, rows: 20 })![0]).toMatch(/too small for a square that can be read/)
    expect(said({ ...own, widthMm: 16, heightMm: 16 })![0]).toMatch(/no room for the code/)
    expect(said({ ...own, gapXMm: -1 })).toContain('A gap is 0 or more.')
    expect(said({ ...own, columns: 1.5 })).toHaveLength(1)
    // Tall and narrow: the words stand under the square.
    const tall = labelLayout({ widthMm: 24, heightMm: 40 })!
    expect(tall.text.yMm).toBeGreaterThanOrEqual(tall.square.yMm + tall.square.sideMm)
  })

  it('a begun sheet goes on at its first free label', () => {
    const grid = genericGrids[0]!.grid
    const sheets = sheetsOf([...'abcdefghijklmnopqrstuvwxyz'], grid, 20)
    expect(sheets.map((sheet) => sheet.length)).toEqual([2, 21, 3])
    expect(sheets[0]!.map(({ index }) => index)).toEqual([19, 20])
    expect(sheets[1]![0]).toEqual({ index: 0, item: 'c' })
  })

  it('of all jars, a station, retains, those moved, or those named', () => {
    const own = [
      jar(codes[0]!),
      jar(codes[1]!, { studyStationId: null, kind: 'retain', state: 'kept' }),
      jar(codes[2]!, { state: 'spent' }),
      { ...jar(codes[3]!), isMoved: true },
    ]
    const of = (choice: { of: string; jars?: string }) => chooseJars(own, labelChoice.parse(choice))
    const names = (choice: { of: string; jars?: string }) => of(choice).chosen.map((one) => one.code)
    expect(names({ of: 'all' })).toEqual([codes[0], codes[1], codes[3]])
    expect(names({ of: 'retains' })).toEqual([codes[1]])
    expect(names({ of: 'moved' })).toEqual([codes[3]])
    expect(names({ of: own[0]!.studyStationId! })).toEqual([codes[0], codes[3]])
    expect(names({ of: 'jars', jars: `${codes[0]!.toLowerCase()}, -10·${codes[3]}` })).toEqual([
      codes[0],
      codes[3],
    ])
    const mistyped = `${codes[0]!.slice(0, 4)}${codes[0]!.endsWith('X') ? 'Y' : 'X'}`
    expect(of({ of: 'jars', jars: mistyped }).fault).toMatch(/is no jar code/)
    expect(of({ of: 'jars', jars: codes[2]! }).fault).toMatch(/No jar of this study that still stands/)
    expect(of({ of: 'jars' }).fault).toMatch(/No jar is chosen/)
  })
})

describe('what stands on a label', () => {
  it('how the jar stands, in which pack, and for which laboratory', () => {
    expect(labelWords(jar('234C7'), 'airless pump, 30 mL')).toEqual({
      code: '−10·234C7',
      lines: [
        'S-123456, WWWWWWWWWWMMMMMMMMMM-12345',
        'measuring',
        'Inverted, in foil',
        'airless pump, 30 mL',
        `2/14, ${long}`,
        '30 Nov 2026',
      ],
    })
    const aside = jar('234C7', {
      ...{ studyStationId: null, isFreezeThaw: null, variant: null, shelf: null },
      ...{ kind: 'retain', setAsideFor: 'microbiology' },
    })
    expect(labelWords(aside, null).lines.slice(1, 3)).toEqual(['for microbiology', 'retain cupboard'])
    expect(labelWords(jar('234C7', { variant: 'lying' }), null).lines[2]).toBe('Lying')
  })

  it('a long line grows smaller, then ends in an ellipsis; it never leaves its label', () => {
    expect(fitLine('oven 3', 30, 3)).toEqual({ text: 'oven 3', sizeMm: 3 })
    const smaller = fitLine('room cabinet, shelf 2', 25, 3)
    expect(smaller.text).toBe('room cabinet, shelf 2')
    expect(smaller.sizeMm).toBeLessThan(3)
    const cut = fitLine(long, 20, 3)
    expect(cut.text).toMatch(/^Klima.*…$/)
    expect(cut.sizeMm).toBeCloseTo(2.1)
    expect(fitLine('', 20, 3).text).toBe('')
    expect(fitLine('WWWW', 0.1, 3).text).toBe('…')
  })

  it.each(genericGrids)('$key: nothing lies outside its label', ({ grid }) => {
    const label = { id: 'a', jarCode: codes[0]!, ...labelWords(jar(codes[0]!), 'pump'), qr: qrOf(codes[0]!) }
    const { words } = labelShapes(grid, 4, label)
    const { xMm, yMm } = labelPlace(grid, 4)
    for (const shape of words) {
      if (shape.kind !== 'text') throw new Error('words are text')
      expect(shape.x).toBeGreaterThanOrEqual(xMm * pt)
      expect(shape.y).toBeLessThanOrEqual((yMm + grid.heightMm) * pt)
      expect(shape.y - shape.size).toBeGreaterThanOrEqual(yMm * pt - 0.01)
      // Mono has one advance of 0.632; the others are checked by fitLine.
      if (shape.mono)
        expect(shape.x + shape.text.length * 0.632 * shape.size).toBeLessThanOrEqual(
          (xMm + grid.widthMm) * pt,
        )
    }
  })
})

describe('the PDF of labels', () => {
  it.each(genericGrids)(
    '$key: each square, read from the page, is the code of the jar whose label it is',
    async ({ key, grid }) => {
      const bytes = await renderLabels(labels(), labelChoice.parse({ sheet: key, first: 2 }))
      const pages = pdfContents(bytes)
      const sheets = sheetsOf(codes, grid, 2)
      expect(pages).toHaveLength(sheets.length)
      pages.forEach((content, at) => {
        const squares = drawnSquares(content)
        expect(squares.map(({ dark }) => readQr(dark))).toEqual(sheets[at]!.map(({ item }) => item))
        squares.forEach(({ left, top, module }, one) => {
          const { xMm, yMm } = labelPlace(grid, sheets[at]![one]!.index)
          // Four white modules on every side lie inside the label [std: ISO/IEC 18004].
          expect(left - 4 * module).toBeGreaterThanOrEqual(xMm * pt - 0.02)
          expect(left + 25 * module).toBeLessThanOrEqual((xMm + grid.widthMm) * pt + 0.02)
          expect(top - 4 * module).toBeGreaterThanOrEqual(yMm * pt - 0.02)
          expect(top + 25 * module).toBeLessThanOrEqual((yMm + grid.heightMm) * pt + 0.02)
          expect(module / pt).toBeGreaterThanOrEqual(0.419)
        })
      })
      const text = pdfText(bytes).join('').replaceAll('\n', '')
      for (const code of codes) expect(text).toContain(`−10·${code}`)
      expect(text).toContain('Inverted, in foil')
    },
  )

  it('is refused for a label that the sheet has not, and for an own sheet that nobody has described', async () => {
    const choice = (more: object) => labelChoice.parse(more)
    await expect(renderLabels(labels(), choice({ first: 22 }))).rejects.toThrow(
      /has 21 labels, so none is number 22/,
    )
    await expect(renderLabels(labels(), choice({ sheet: 'own' }))).rejects.toThrow(
      /no label sheet of its own/,
    )
    await expect(renderLabels(labels([]), choice({}))).rejects.toThrow(/No jar/)
    const own = { ...genericGrids[0]!.grid, columns: 2, rows: 2 }
    expect(pdfContents(await renderLabels(labels(undefined, own), choice({ sheet: 'own' })))).toHaveLength(8)
  })
})
