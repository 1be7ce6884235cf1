import { Svg, Text, View } from '@react-pdf/renderer'
import { PdfDrawn } from '@/components/marks/pdf-drawn'
import { moveShapes } from '@/components/marks/place'
import { regressionKeyShapes, regressionShapes } from '@/components/charts/regression-shapes'
import { text } from '@/lib/report/document/fonts'
import { style } from '@/lib/report/document/page-frame'
import type { AttributeEvidence, CaseContent } from '@/lib/shelf-case/rules/content'
import { regressionView } from '@/lib/shelf-case/rules/plot'

const sheetWidth = 511

/** The curve that stands on the first page: that of the attribute which limits, else the first there is. */
export function firstCurve(content: CaseContent): AttributeEvidence | undefined {
  return (
    content.attributes.find((a) => a.calc && a.attribute === content.limitingAttribute) ??
    content.attributes.find((a) => a.calc && a.attribute === 'viscosity') ??
    content.attributes.find((a) => a.calc)
  )
}

export function Curve({
  a,
  content,
  height = 250,
}: {
  a: AttributeEvidence
  content: CaseContent
  height?: number
}) {
  const view = regressionView(a, 60)
  if (!view || !a.calc) return null
  const { label } = view
  const size = { width: 700, height }
  const shapes = regressionShapes({
    ...size,
    batches: view.batches,
    lower: view.lower,
    upper: view.upper,
    limitText: {
      ...(view.lower === null ? {} : { lower: `allowed down to ${label(view.lower)}` }),
      ...(view.upper === null ? {} : { upper: `allowed up to ${label(view.upper)}` }),
    },
    dataMonths: content.dataMonths,
    proposedMonths: content.proposal.months,
    crossingMonths: a.crossingMonths,
    crossingSide: a.calc.output.batches.find((b) => b.crossing === a.crossingMonths)?.side ?? null,
    decides: a.decidedBy,
    format: label,
  })
  const scale = sheetWidth / size.width
  return (
    <View wrap={false} style={{ marginTop: 2 }}>
      <Text style={style.h2}>
        {a.label} <Text style={{ fontWeight: 400, fontSize: 8.5 }}>{view.unit}, by month</Text>
      </Text>
      <Svg
        width={sheetWidth}
        height={(size.height + 20) * scale}
        viewBox={`0 0 ${size.width} ${size.height + 20}`}
      >
        <PdfDrawn
          fontFamily={text as unknown as string}
          shapes={[
            ...moveShapes(
              regressionKeyShapes(
                view.batches.map((b) => b.name),
                420,
              ),
              52,
              0,
            ),
            ...moveShapes(shapes, 0, 20),
          ]}
        />
      </Svg>
      <Text style={style.soft}>
        Fitted: {a.scale}. Dashed: carried on by the line. Dotted: its confidence bound.
      </Text>
    </View>
  )
}
