import { Page, StyleSheet, Svg, Text, View } from '@react-pdf/renderer'
import type { ReactNode } from 'react'
import { LOGO_HEIGHT, LOGO_WIDTH, logoShapes } from '@/components/marks/logo-shapes'
import { PdfDrawn } from '@/components/marks/pdf-drawn'
import { text } from '@/lib/report/document/fonts'

// react-pdf's types know one family; its layout takes a list and falls back sign by sign.
const family = text as unknown as string

export const style = StyleSheet.create({
  page: {
    fontFamily: family,
    fontSize: 9,
    paddingTop: 62,
    paddingBottom: 44,
    paddingHorizontal: 42,
    color: '#000',
  },
  head: {
    position: 'absolute',
    top: 26,
    left: 42,
    right: 42,
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'flex-end',
    borderBottomWidth: 0.75,
    borderBottomColor: '#000',
    paddingBottom: 2,
  },
  brand: { fontSize: 13, fontWeight: 700 },
  foot: { position: 'absolute', bottom: 18, left: 42, right: 42, fontSize: 7.5, color: '#333' },
  h1: { fontSize: 15, fontWeight: 700, marginBottom: 4 },
  h2: { fontSize: 11, fontWeight: 700, marginTop: 12, marginBottom: 3 },
  row: { flexDirection: 'row', borderBottomWidth: 0.5, borderBottomColor: '#aaa', paddingVertical: 2.2 },
  headRow: {
    flexDirection: 'row',
    borderBottomWidth: 1,
    borderBottomColor: '#000',
    paddingVertical: 2,
    fontSize: 7.5,
  },
  soft: { color: '#333' },
  bold: { fontWeight: 700 },
})

/** One sheet of the report: the logo on its line, which case and page, and what the report is not. */
export function PageFrame({
  code,
  isInvented,
  children,
}: {
  code: string
  isInvented: boolean
  children?: ReactNode
}) {
  return (
    <Page size="A4" style={style.page}>
      <View style={style.head} fixed>
        <View style={{ flexDirection: 'row', alignItems: 'flex-end' }}>
          <Svg
            width={LOGO_WIDTH * 0.72}
            height={LOGO_HEIGHT * 0.72}
            viewBox={`0 ${-LOGO_HEIGHT} ${LOGO_WIDTH} ${LOGO_HEIGHT}`}
          >
            <PdfDrawn shapes={logoShapes()} />
          </Svg>
          <Text style={[style.brand, { marginLeft: 8 }]}>Stillstand</Text>
        </View>
        <Text
          render={({ pageNumber, totalPages }) =>
            `Shelf-life report, case ${code}, page ${pageNumber} of ${totalPages}`
          }
        />
      </View>
      {children}
      <Text style={style.foot} fixed>
        The comb draws the SHA-256 of the frozen content, digit by digit: compare it with the one on screen.
        Stillstand supports judgement; it does not certify. Safety, preservation and microbiology rest with
        qualified laboratories and the responsible assessor.
        {isInvented ? ' Invented data of a demonstration.' : ''}
      </Text>
    </Page>
  )
}
