import { Ledger } from '@/components/ui/ledger'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'
import type { Computed } from '@/lib/shelf-case/rules/build'

/** The statistics of each attribute in figures; each row names the topic of `calc` that makes it again. */
export function CarryTable({ content }: { content: Computed }) {
  return (
    <Ledger
      caption={`What each attribute supports at ${content.station.name}`}
      rows={content.attributes}
      rowKey={(a) => a.attribute}
      columns={[
        {
          key: 'attribute',
          title: `Attribute, ${content.station.temperatureC} °C`,
          cell: (a) => <span className={weight(a, content)}>{a.label}</span>,
        },
        {
          key: 'limit',
          title: 'allowed',
          cell: (a) => <span className={weight(a, content)}>{a.limit}</span>,
        },
        { key: 'n', title: 'n', align: 'right', cell: (a) => a.n },
        {
          key: 'model',
          title: 'model',
          from: 'tablet',
          cell: (a) => a.calc?.output.model ?? 'last time passed',
        },
        {
          key: 'slope',
          title: 'slope a month',
          align: 'right',
          from: 'tablet',
          cell: (a) => slopeText(a),
        },
        {
          key: 'sd',
          title: 'resid. SD',
          align: 'right',
          from: 'desk',
          cell: (a) => deciding(a)?.residualSd.toPrecision(2) ?? '',
        },
        { key: 'ps', title: 'p, slopes', align: 'right', from: 'desk', cell: (a) => pText(a, 'slopes') },
        {
          key: 'pi',
          title: 'p, intercepts',
          align: 'right',
          from: 'desk',
          cell: (a) => pText(a, 'intercepts'),
        },
        {
          key: 'months',
          title: 'months',
          align: 'right',
          cell: (a) => (
            <b className={a.attribute === content.limitingAttribute ? 'text-alarm' : ''}>{monthsText(a)}</b>
          ),
        },
        { key: 'by', title: 'decided by', from: 'tablet', cell: (a) => a.decidedBy ?? 'none' },
      ]}
    />
  )
}

function weight(a: AttributeEvidence, content: Computed): string {
  return a.attribute === content.limitingAttribute ? 'font-700' : ''
}

function deciding(a: AttributeEvidence) {
  const out = a.calc?.output
  return out?.batches.find((b) => b.name === out.limitingBatch) ?? out?.batches[0]
}

function slopeText(a: AttributeEvidence): string {
  const slope = deciding(a)?.slope
  if (slope === undefined) return ''
  // A logarithm's slope is, for small changes, the share lost a month.
  if (a.scale.includes('logarithm')) return `${sign((Math.exp(slope) - 1) * 100, 2)} %`
  return sign(slope, 3)
}

function sign(value: number, decimals: number): string {
  return value < 0 ? `\u2212${Math.abs(value).toFixed(decimals)}` : `+${value.toFixed(decimals)}`
}

function pText(a: AttributeEvidence, name: string): string {
  const out = a.calc?.output
  if (!out) return ''
  const test = out.tests.find((t) => t.name === name)
  if (!test) return out.batches.length > 1 ? 'not asked' : 'one batch'
  return test.p === null ? 'not known' : test.p < 0.001 ? '< 0.001' : test.p.toPrecision(2)
}

function monthsText(a: AttributeEvidence): string {
  if (a.basis === 'observed') return String(a.supportedMonths)
  return a.crossingMonths === null ? 'past 60' : a.crossingMonths.toFixed(1)
}
