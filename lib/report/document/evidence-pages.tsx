import { Text, View } from '@react-pdf/renderer'
import { Curve, firstCurve } from '@/lib/report/document/curve'
import { style } from '@/lib/report/document/page-frame'
import { dayText } from '@/lib/report/rules'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { crossingText, slopeText, testText } from '@/lib/shelf-case/rules/scale'

/** The statistics of every attribute with its curve, the temperature record, and what weakens the case. */
export function EvidencePages({ content }: { content: CaseContent }) {
  const curves = content.attributes.filter((a) => a.calc)
  return (
    <>
      <Text style={style.h1}>The statistics</Text>
      <Text>
        {curves.length > 0
          ? 'Regression as in ICH Q1E (2003): batches pooled where slopes, then intercepts, agree (p over 0.25); the confidence bound of the mean line meets the limit.'
          : 'No attribute has three times in every batch, so no regression is made.'}{' '}
        {content.cap
          ? `Cap: ${content.cap.output.rule}; ${content.cap.why} Supported months are whole, rounded down, the least over attributes.`
          : ''}
      </Text>
      <StatisticsTable content={content} />
      {content.format === 'stillstand-case-1' ? null : (
        <Text style={[style.soft, { marginTop: 4 }]}>
          The frozen content holds the exact input of every figure. It is downloaded from the case’s page; npm
          run recheck -- case-{content.case.code}.json computes all of them again.
        </Text>
      )}
      {curves
        .filter((a) => a !== firstCurve(content))
        .map((a) => (
          <Curve key={a.attribute} a={a} content={content} />
        ))}
      <View wrap={false}>
        <Text style={style.h2}>Temperature of {content.station.name}</Text>
        <Text>{temperatureText(content)}</Text>
      </View>
      <OutsideResults content={content} />
      <Text style={style.h2}>What weakens it</Text>
      {content.weakens.length === 0 ? <Text>Nothing was noted.</Text> : null}
      {content.weakens.map((w, i) => (
        <View key={i} style={style.row} wrap={false}>
          <Text style={{ width: 62, color: '#333' }}>{w.state}</Text>
          <View style={{ flex: 1 }}>
            <Text style={style.bold}>{w.title}</Text>
            <Text>{w.text}</Text>
            {w.by ? <Text style={style.soft}>answered by {w.by}</Text> : null}
          </View>
        </View>
      ))}
    </>
  )
}

/** Supporting evidence: nothing is computed from it. */
function OutsideResults({ content: { outside = [] } }: { content: CaseContent }) {
  if (outside.length === 0) return null
  return (
    <View>
      <Text style={style.h2}>Outside laboratories</Text>
      {outside.map((x) => (
        <View key={`${x.sha256} ${x.test} ${x.batch}`} style={style.row} wrap={false}>
          <Text style={{ width: 62, color: '#333' }}>{x.outcome}</Text>
          <View style={{ flex: 1 }}>
            <Text style={style.bold}>
              {x.test}
              {x.value ? `: ${x.value}` : ''}
            </Text>
            <Text>
              {x.labName}, report {x.reportNumber} of {dayText(x.reportedOn)}
              {x.batch ? `, batch ${x.batch}` : ''}
              {x.weeks === null ? '' : `, week ${x.weeks}`}. Entered by {x.by}.
            </Text>
            <Text style={style.soft}>document {x.sha256}</Text>
          </View>
        </View>
      ))}
    </View>
  )
}

function StatisticsTable({ content }: { content: CaseContent }) {
  return (
    <View style={{ marginTop: 8 }}>
      <View style={style.headRow}>
        <Text style={{ width: 84 }}>Attribute</Text>
        <Text style={{ width: 30, textAlign: 'right' }}>n</Text>
        <Text style={{ width: 90, paddingLeft: 12 }}>model</Text>
        <Text style={{ width: 72, textAlign: 'right' }}>slope a month</Text>
        <Text style={{ width: 56, textAlign: 'right' }}>p, slopes</Text>
        <Text style={{ width: 64, textAlign: 'right' }}>p, intercepts</Text>
        <Text style={{ width: 54, textAlign: 'right' }}>bound meets</Text>
        <Text style={{ flex: 1, textAlign: 'right' }}>decided by</Text>
      </View>
      {content.attributes.map((a) => {
        return (
          <View key={a.attribute} style={style.row} wrap={false}>
            <Text style={{ width: 84 }}>{a.label}</Text>
            <Text style={{ width: 30, textAlign: 'right' }}>{String(a.n)}</Text>
            <Text style={{ width: 90, paddingLeft: 12 }}>{a.calc?.output.model ?? 'last passed'}</Text>
            <Text style={{ width: 72, textAlign: 'right' }}>{slopeText(a)}</Text>
            <Text style={{ width: 56, textAlign: 'right' }}>{testText(a, 'slopes')}</Text>
            <Text style={{ width: 64, textAlign: 'right' }}>{testText(a, 'intercepts')}</Text>
            <Text style={{ width: 54, textAlign: 'right' }}>{crossingText(a)}</Text>
            <Text style={{ flex: 1, textAlign: 'right' }}>{a.decidedBy ?? 'all'}</Text>
          </View>
        )
      })}
    </View>
  )
}

function temperatureText(content: CaseContent): string {
  const record = content.temperatureRecord
  if (!record) return 'No temperatures of this station are on record.'
  const { mktC, meanC, minC, maxC } = record.calc.output
  const first = `Mean kinetic temperature ${mktC.toFixed(1)} °C, mean ${meanC.toFixed(1)} °C, ${minC.toFixed(1)} to ${maxC.toFixed(1)} °C, from ${record.calc.input.temperaturesC.length} entries (83.144 kJ/mol, USP chapter 1160).`
  const rest = record.excursions.map(
    (x) =>
      `Outside its limits from ${dayText(x.from)}, ${Math.round(x.hours)} h, ${x.worstC.toFixed(1)} °C at the worst.`,
  )
  return [first, ...(rest.length > 0 ? rest : ['It did not leave its limits.'])].join(' ')
}
