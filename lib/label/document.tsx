import { createElement } from 'react'
import { Document, Page, renderToBuffer, Svg } from '@react-pdf/renderer'
import { labelOf } from '@/components/jar/label-of'
import { pointsPerMm, labelShapes } from '@/components/jar/label-shapes'
import { PdfDrawn } from '@/components/marks/pdf-drawn'
import { refuse } from '@/lib/http/errors'
import { mono, registerFonts, text } from '@/lib/report/document/fonts'
import type { StudyLabels } from './queries'
import { chooseJars, sheetsOf } from './rules/choose'
import { genericGrids, labelsPerSheet, papers, type LabelGrid } from './rules/grid'
import { ownGridKey, type LabelChoice } from './schema'

// react-pdf's types know one family; its layout takes a list and falls back sign by sign.
const [textFamily, monoFamily] = [text as unknown as string, mono as unknown as string]

/** Sheets of labels, true to scale: print them at 100 %. */
export async function renderLabels(labels: StudyLabels, choice: LabelChoice): Promise<Uint8Array> {
  const grid = gridOf(labels, choice)
  const { chosen, fault } = chooseJars(labels.jars, choice)
  if (fault) throw refuse.invalid(fault, { [choice.of === 'jars' ? 'jars' : 'of']: fault })
  const whole = labelsPerSheet(grid)
  if (choice.first > whole) {
    const sentence = `A sheet of this kind has ${whole} labels, so none is number ${choice.first}.`
    throw refuse.invalid(sentence, { first: sentence })
  }
  registerFonts()
  const [width, height] = [
    papers[grid.paper].widthMm * pointsPerMm,
    papers[grid.paper].heightMm * pointsPerMm,
  ]
  const sheets = sheetsOf(
    chosen.map((jar) => labelOf(jar, labels.ownPack)),
    grid,
    choice.first,
  )
  const document = createElement(
    Document,
    { title: `Labels of ${labels.code}`, creator: 'Stillstand', producer: 'Stillstand', language: 'en' },
    ...sheets.map((sheet, at) => (
      <Page key={at} size={[width, height]} wrap={false}>
        <Svg width={width} height={height} viewBox={`0 0 ${width} ${height}`}>
          {sheet.map(({ index, item }) => {
            const { square, words } = labelShapes(grid, index, item)
            return (
              <PdfDrawn
                key={item.id}
                shapes={[...square, ...words]}
                fontFamily={textFamily}
                monoFamily={monoFamily}
              />
            )
          })}
        </Svg>
      </Page>
    )),
  )
  return new Uint8Array(await renderToBuffer(document))
}

function gridOf({ ownGrid }: StudyLabels, { sheet }: LabelChoice): LabelGrid {
  if (sheet !== ownGridKey) return genericGrids.find((one) => one.key === sheet)!.grid
  if (ownGrid) return ownGrid
  throw refuse.invalid(
    'The lab has described no label sheet of its own. Choose another sheet, or ask a manager to type it in the settings.',
    { sheet: 'There is none yet.' },
  )
}
