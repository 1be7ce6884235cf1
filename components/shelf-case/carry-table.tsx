'use client'

import { FigureDetails } from '@/components/ui/figure-details'
import { Ledger } from '@/components/ui/ledger'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'
import type { Computed } from '@/lib/shelf-case/rules/build'
import { attributeFacts } from './case-facts'
import { crossingText, decidingFit, slopeText, testText } from '@/lib/shelf-case/rules/scale'

/** The statistics of each attribute in figures; each row names the topic of `calc` that makes it again. */
export function CarryTable({ content, when }: { content: Computed; when: string }) {
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
          cell: (a) => decidingFit(a)?.residualSd.toPrecision(2) ?? '',
        },
        { key: 'ps', title: 'p, slopes', align: 'right', from: 'desk', cell: (a) => testText(a, 'slopes') },
        {
          key: 'pi',
          title: 'p, intercepts',
          align: 'right',
          from: 'desk',
          cell: (a) => testText(a, 'intercepts'),
        },
        {
          key: 'months',
          title: 'months',
          align: 'right',
          cell: (a) => (
            <FigureDetails
              figure={`${a.label}, ${monthsText(a)} months,`}
              facts={() => attributeFacts(a, content, when)}
              className={a.attribute === content.limitingAttribute ? 'font-700 text-alarm' : 'font-700'}
            >
              {monthsText(a)}
            </FigureDetails>
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

function monthsText(a: AttributeEvidence): string {
  return a.basis === 'observed' ? String(a.supportedMonths) : crossingText(a)
}
