'use client'

import type { ReactNode } from 'react'
import { FigureDetails } from '@/components/ui/figure-details'
import { Section } from '@/components/ui/section'
import { dayText } from '@/lib/report/rules'
import { capital } from '@/lib/study/rules/words'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'
import type { Computed } from '@/lib/shelf-case/rules/build'
import { capFacts, frozenText, hashFacts, monthsFacts, recordFacts } from './case-facts'

type Props = { content: Computed; whyFewer: string; months: number; kind: string; detail: CaseDetail }

/** The evidence behind the months, one line each. */
export function RestsOn({ content, whyFewer, months, kind, detail }: Props) {
  const { cap } = content
  const when = frozenText(detail)
  const counted = content.readings.filter((r) => r.state === 'counts').length
  const record = content.temperatureRecord
  const accelerated = content.shelves.filter((s) => !s.isFreezeThaw && (s.temperatureC ?? 0) >= 38)
  const hottest = Math.max(...accelerated.map((s) => s.temperatureC ?? 0))
  const cycles = content.shelves.filter((s) => s.isFreezeThaw)
  const rows: [string, ReactNode][] = [
    [
      'Readings',
      <>
        <b>{counted}</b> of {content.readings.length} count
      </>,
    ],
    [
      'Batches',
      content.batches.map((b) => b.code).join(', ') +
        `: ${[...new Set(content.batches.map((b) => b.formula))].join('; ')}`,
    ],
    ...(accelerated.length > 0
      ? ([
          [
            `${hottest} °C`,
            `at most ${worst(accelerated).toFixed(1)} % came apart in ${Math.floor(span(accelerated))} months`,
          ],
        ] as [string, ReactNode][])
      : []),
    ...(cycles.length > 0
      ? ([['Freeze-thaw', `at most ${worst(cycles).toFixed(1)} % came apart`]] as [string, ReactNode][])
      : []),
    [
      content.station.name,
      record ? (
        <>
          mean kinetic{' '}
          <FigureDetails
            figure={`${record.calc.output.mktC.toFixed(1)} °C`}
            facts={() => recordFacts(record, when)}
          />
          ,{' '}
          {record.excursions.length === 0
            ? 'never outside its limits'
            : record.excursions.length === 1
              ? 'one excursion'
              : `${record.excursions.length} excursions`}
        </>
      ) : (
        'no temperatures on record'
      ),
    ],
    ...(cap
      ? ([
          [
            'Cap',
            <>
              {cap.output.rule}:{' '}
              <FigureDetails
                figure={`${Math.floor(cap.output.capMonths)} months`}
                facts={() => capFacts(cap, when)}
              />
              . {cap.why}
            </>,
          ],
        ] as [string, ReactNode][])
      : []),
    ...(content.outside ?? []).map((x): [string, ReactNode] => [
      capital(x.what),
      `${x.test}: ${x.outcome}${x.value ? `, ${x.value}` : ''}. ${x.labName}, report ${x.reportNumber} of ${dayText(x.reportedOn)}${x.batch ? `, ${x.batch}` : ''}`,
    ]),
    [
      'Supported',
      <FigureDetails
        key="supported"
        figure={`${content.supportedMonths} months`}
        facts={() => monthsFacts(content, months, when)}
      />,
    ],
    ...(detail.contentSha256
      ? ([
          [
            'Frozen as',
            <FigureDetails
              key="hash"
              figure={`hash ${detail.contentSha256.slice(0, 8)}`}
              facts={() => hashFacts(detail)}
            >
              <code className="font-mono text-14">{detail.contentSha256.slice(0, 8)}</code>
            </FigureDetails>,
          ],
        ] as [string, ReactNode][])
      : []),
    ...(kind === 'provisional'
      ? ([
          ['The lab’s rule', detail.provisionalRule],
          ['Reviewed on', detail.reviewOn ? dayText(detail.reviewOn) : ''],
        ] as [string, ReactNode][])
      : []),
    ...(whyFewer
      ? ([[`Why ${months}, not ${content.supportedMonths}`, `“${whyFewer}”`]] as [string, ReactNode][])
      : []),
    ...(detail.periodAfterOpeningMonths
      ? ([
          [
            'After opening',
            `${detail.periodAfterOpeningMonths} months: ${detail.periodAfterOpeningEvidence}`,
          ],
        ] as [string, ReactNode][])
      : []),
  ]
  return (
    <Section title="What it rests on">
      <dl className="-mt-3">
        {rows.map(([name, text]) => (
          <div key={name} className="grid grid-cols-[130px_1fr] gap-3 border-b border-hair py-2">
            <dt className="text-soft">{name}</dt>
            <dd className="min-w-0 break-words">{text}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-3 text-13 text-soft">
        Accelerated results support, they never prove a shelf life. Safety, preservation and microbiology rest
        with qualified laboratories and the responsible assessor under local law.
      </p>
    </Section>
  )
}

const worst = (shelves: Computed['shelves']) =>
  Math.max(0, ...shelves.flatMap((s) => s.jars.map((j) => j.percent)))
const span = (shelves: Computed['shelves']) =>
  Math.max(0, ...shelves.flatMap((s) => s.jars.map((j) => j.months)))
