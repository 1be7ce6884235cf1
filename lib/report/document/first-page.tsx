import { Svg, Text, View } from '@react-pdf/renderer'
import { bandBarShapes } from '@/components/marks/band-bar-shapes'
import { hashCombShapes } from '@/components/marks/hash-comb-shapes'
import { PdfDrawn } from '@/components/marks/pdf-drawn'
import { moveShapes } from '@/components/marks/place'
import { Curve, firstCurve } from '@/lib/report/document/curve'
import { mono } from '@/lib/report/document/fonts'
import { style } from '@/lib/report/document/page-frame'
import { Shelves } from '@/lib/report/document/shelves'
import { dayText, hashGroups, instantText } from '@/lib/report/rules'
import { shownWithUnit } from '@/lib/study/rules/words'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { ReportInput } from '@/lib/report/document/report'
import type { AttributeEvidence, CaseContent } from '@/lib/shelf-case/rules/content'

/** The finding, the shelves, one line an attribute, and the signature: what a reader needs on one sheet. */
export function FirstPage({ content, contentSha256, signatures }: ReportInput) {
  const { proposal, study } = content
  const curve = firstCurve(content)
  return (
    <>
      <Text style={{ fontSize: 9.5 }}>
        {study.title}. {content.batches.length === 1 ? 'Batch' : 'Batches'}{' '}
        {content.batches.map((b) => b.code).join(', ')}, study {study.code}, {dayText(study.startedOn)} to{' '}
        {dayText(study.lastReadOn)}
      </Text>
      <View style={{ flexDirection: 'row', alignItems: 'flex-end', marginTop: 4 }}>
        <Text style={{ fontSize: 88, lineHeight: 0.95 }}>{String(proposal.months)}</Text>
        <Text style={{ fontSize: 34, marginLeft: 6, marginBottom: 7 }}>
          {proposal.months === 1 ? 'month' : 'months'}
        </Text>
        <View style={{ flex: 1, marginLeft: 26, marginBottom: 12 }}>
          <Text style={{ fontSize: 12, fontWeight: 700 }}>
            {content.case.kind === 'provisional' ? 'Provisional: ' : ''}
            {proposal.storageStatement}
          </Text>
          <Text style={{ marginTop: 4, fontSize: 9.5 }}>{basisText(content)}</Text>
        </View>
      </View>
      <Shelves content={content} />
      {curve ? <Curve a={curve} content={content} height={140} /> : null}
      <View style={{ marginTop: 8 }}>
        <View style={style.headRow}>
          <Text style={{ width: 92 }}>Attribute</Text>
          <Text style={{ width: 128 }}>allowed</Text>
          <Text style={{ width: 62, textAlign: 'right' }}>worst, latest</Text>
          <Text style={{ width: 122 }} />
          <Text style={{ flex: 1, textAlign: 'right' }}>supports</Text>
        </View>
        {content.attributes.map((a) => (
          <AttributeRow key={a.attribute} a={a} isLimiting={a.attribute === content.limitingAttribute} />
        ))}
      </View>
      <Signatures content={content} contentSha256={contentSha256} signatures={signatures} />
    </>
  )
}

function basisText(content: CaseContent): string {
  const { proposal } = content
  if (content.case.kind === 'provisional')
    return `By the lab’s own written rule, not by statistics: ${proposal.provisionalRule} Pulls go on; reviewed on ${proposal.reviewOn ? dayText(proposal.reviewOn) : 'a day not named'}.`
  const limiting = content.attributes.find((a) => a.attribute === content.limitingAttribute)
  const parts = [
    limiting ? `${limiting.label} sets the limit.` : '',
    `The evidence supports ${content.supportedMonths} months.`,
    content.cap
      ? `The rule for ${Math.floor(content.dataMonths)} months of data allows ${Math.floor(content.cap.output.capMonths)}.`
      : '',
    proposal.months < content.supportedMonths ? `Proposed ${proposal.months}: ${proposal.whyFewer}` : '',
    proposal.periodAfterOpeningMonths
      ? `After opening ${proposal.periodAfterOpeningMonths} months: ${proposal.periodAfterOpeningEvidence}`
      : '',
  ]
  return parts.filter(Boolean).join(' ')
}

function AttributeRow({ a, isLimiting }: { a: AttributeEvidence; isLimiting: boolean }) {
  const how = a.basis === 'regression' ? 'statistics' : 'all passed'
  return (
    <View style={[style.row, isLimiting ? style.bold : {}, { alignItems: 'center' }]} wrap={false}>
      <Text style={{ width: 92 }}>{a.label}</Text>
      <Text style={{ width: 128 }}>{a.limit}</Text>
      <Text style={{ width: 62, textAlign: 'right' }}>{a.worst ? worstText(a, a.worst.value) : ''}</Text>
      <View style={{ width: 122, paddingLeft: 14 }}>
        {a.worst ? (
          <Svg width={104} height={10} viewBox="0 0 104 10">
            <PdfDrawn
              shapes={moveShapes(
                bandBarShapes({
                  width: 100,
                  lower: a.band.lower,
                  upper: a.band.upper,
                  initial: a.band.initial,
                  last: null,
                  now: a.worst.value,
                  height: 5,
                }),
                2,
                5,
              )}
            />
          </Svg>
        ) : null}
      </View>
      <Text style={{ flex: 1, textAlign: 'right' }}>
        {a.supportedMonths} months, {how}
      </Text>
    </View>
  )
}

function worstText(evidence: AttributeEvidence, value: number): string {
  return shownWithUnit(attributeOf(evidence.attribute, evidence), value)
}

export function Signatures({ content, contentSha256, signatures }: ReportInput) {
  const zone = content.lab.timeZone
  return (
    <View style={{ borderWidth: 1.5, borderColor: '#000', padding: 8, marginTop: 10 }} wrap={false}>
      <View style={{ flexDirection: 'row' }}>
        <View style={{ width: 190, marginRight: 14 }}>
          {signatures.map((s) => (
            <View key={s.id} style={{ marginBottom: 4 }}>
              <Text style={{ fontSize: 13, fontWeight: 700 }}>
                {s.meaning === 'approve' ? 'Approved' : 'Sent back'}
              </Text>
              <Text>{s.personName}, quality assurance</Text>
              <Text>{instantText(s.signedAt, s.zone)}</Text>
              {s.comment ? <Text style={style.soft}>“{s.comment}”</Text> : null}
            </View>
          ))}
          <Text style={style.soft}>
            Put forward by {content.putForward.by}, {instantText(content.putForward.at, zone)}
          </Text>
        </View>
        <View>
          <Svg width={286} height={34} viewBox="0 0 286 34">
            <PdfDrawn shapes={hashCombShapes(contentSha256, { width: 286, height: 30 })} />
          </Svg>
          <Text style={{ fontFamily: mono as unknown as string, fontSize: 9, marginTop: 3 }}>
            {hashGroups(contentSha256).slice(0, 4).join('  ')}
          </Text>
          <Text style={{ fontFamily: mono as unknown as string, fontSize: 9 }}>
            {hashGroups(contentSha256).slice(4).join('  ')}
          </Text>
        </View>
      </View>
    </View>
  )
}
