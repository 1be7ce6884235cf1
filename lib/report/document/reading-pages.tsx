import { Text, View } from '@react-pdf/renderer'
import { style } from '@/lib/report/document/page-frame'
import { minuteText, weekText } from '@/lib/report/rules'
import { shownValue } from '@/lib/study/rules/words'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { CaseContent, ReadingEvidence } from '@/lib/shelf-case/rules/content'

/** Every reading as typed, those that were corrected or voided struck through with their reason. */
export function ReadingPages({ content }: { content: CaseContent }) {
  return (
    <>
      <Text style={style.h1}>The readings</Text>
      <Text>
        {content.readings.length} readings as they were typed, with who and when. A reading is never changed:
        a correction or void stands beside it.
      </Text>
      <View style={{ marginTop: 8 }}>
        <View style={style.headRow} fixed>
          <Text style={{ width: 48 }}>batch</Text>
          <Text style={{ width: 78 }}>station</Text>
          <Text style={{ width: 42 }}>jar</Text>
          <Text style={{ width: 48 }}>time</Text>
          <Text style={{ width: 66 }}>attribute</Text>
          <Text style={{ width: 52, textAlign: 'right' }}>typed</Text>
          <Text style={{ width: 58, textAlign: 'right' }}>value</Text>
          <Text style={{ width: 80, paddingLeft: 10 }}>measured</Text>
          <Text style={{ flex: 1 }}>by</Text>
        </View>
        {content.readings.map((r, i) => (
          <Row key={i} r={r} content={content} />
        ))}
      </View>
    </>
  )
}

function Row({ r, content }: { r: ReadingEvidence; content: CaseContent }) {
  const own = content.attributes.find((one) => one.attribute === r.attribute)
  const attribute = attributeOf(r.attribute, own)
  const isGone = r.state === 'superseded' || r.state === 'void'
  const struck = isGone ? ({ textDecoration: 'line-through' } as const) : {}
  return (
    <View style={[style.row, { fontSize: 7.5, paddingVertical: 1.4 }]} wrap={false}>
      <Text style={{ width: 48 }}>{r.batch}</Text>
      <Text style={{ width: 78 }}>{r.station}</Text>
      <Text style={{ width: 42 }}>{r.jar}</Text>
      <Text style={{ width: 48 }}>{r.weeks === 0 ? 'initial' : weekText(r.weeks)}</Text>
      <Text style={{ width: 66 }}>{attribute.label}</Text>
      <Text style={[{ width: 52, textAlign: 'right' }, struck]}>{r.typed}</Text>
      <Text style={[{ width: 58, textAlign: 'right' }, struck]}>
        {r.word ?? (r.value === null ? '' : shownValue(attribute, r.value))}
      </Text>
      <Text style={{ width: 80, paddingLeft: 10 }}>{minuteText(r.measuredAt, content.lab.timeZone)}</Text>
      <Text style={{ flex: 1 }}>
        {r.by}
        {stateOf(r)}
        {r.reason ? `: ${r.reason}` : ''}
      </Text>
    </View>
  )
}

/** What took the place of another is marked as the one that stands; an untouched reading needs no word. */
function stateOf({ state, reason }: ReadingEvidence): string {
  if (state === 'counts') return reason ? '; stands now' : ''
  return state === 'does not count' && reason ? '; stands now, does not count' : `; ${state}`
}
