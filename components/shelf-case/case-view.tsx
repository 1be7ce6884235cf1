'use client'

import useSWR from 'swr'
import { CarryTable } from '@/components/shelf-case/carry-table'
import { CaseActs } from '@/components/shelf-case/case-acts'
import { frozenText } from '@/components/shelf-case/case-facts'
import { HowFar } from '@/components/shelf-case/how-far'
import { RegressionPlot } from '@/components/shelf-case/regression-plot'
import { RestsOn } from '@/components/shelf-case/rests-on'
import { SignPanel } from '@/components/shelf-case/sign-panel'
import { SignatureBox } from '@/components/shelf-case/signature-box'
import { SinceFrozen } from '@/components/shelf-case/since-frozen'
import { Weakens } from '@/components/shelf-case/weakens'
import { Heading } from '@/components/ui/heading'
import { Section } from '@/components/ui/section'
import { fetcher } from '@/lib/http/fetcher'
import { dayText } from '@/lib/report/rules'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'
import type { Computed } from '@/lib/shelf-case/rules/build'
import { caseHeadline } from '@/lib/shelf-case/rules/words'
import { caseKey } from '@/lib/shelf-case/keys'

type Props = {
  code: string
  /** Figures of now, shown while the case is still a draft. */
  draft: Computed | null
  mayPutForward: boolean
  maySign: boolean
  /** Why this person does not sign, though the role may. */
  whyNotSign: string | null
  demoPassword: string | null
}

export function CaseView({ code, draft, mayPutForward, maySign, whyNotSign, demoPassword }: Props) {
  const { data, mutate } = useSWR<CaseDetail>(caseKey(code), fetcher)
  if (!data) return null
  const content = data.content ?? draft
  if (!content) return null
  const months = data.proposedMonths ?? 0
  const limiting = content.attributes.find((a) => a.attribute === content.limitingAttribute)
  // The one that limits, else the one that moves the most to the eye: viscosity.
  const plotted = [
    limiting,
    content.attributes.find((a) => a.attribute === 'viscosity'),
    ...content.attributes,
  ].find((a) => a?.calc)
  const standing = content.weakens.filter((w) => w.state === 'stands').length
  const { lead, rest, sentence } = caseHeadline(data, content)
  return (
    <>
      <Heading
        crumb={
          <>
            Case {data.code}, {content.study.title}. Study{' '}
            <a href={`/studies/${content.study.code}`}>{content.study.code}</a>,{' '}
            {content.batches.length === 1 ? 'one batch' : `${content.batches.length} batches`}, begun{' '}
            {dayText(content.study.startedOn)}
          </>
        }
        headline={
          <>
            <b>{lead}</b> {rest}
          </>
        }
        sentence={sentence}
      />
      {data.isContentWhole ? null : (
        <p role="alert" className="mt-4 border-l-4 border-alarm pl-3 font-650 text-alarm">
          The content of this case was changed below the application and no longer matches its hash. Nothing
          in it may be relied on; tell the lab manager.
        </p>
      )}
      <SinceFrozen detail={data} />
      <div className="mt-6 grid grid-cols-1 gap-x-14 gap-y-8 lg:grid-cols-[minmax(0,1fr)_332px]">
        <div className="flex min-w-0 flex-col gap-8">
          <HowFar content={content} months={months} />
          <CarryTable content={content} when={frozenText(data)} />
          <div className="grid gap-8 xl:grid-cols-2">
            {plotted ? <RegressionPlot evidence={plotted} content={content} months={months} /> : null}
            <RestsOn
              content={content}
              whyFewer={data.whyFewer}
              months={months}
              kind={data.kind}
              detail={data}
            />
          </div>
        </div>
        <aside className="flex min-w-0 flex-col gap-8">
          <Section
            title="What weakens it"
            aside={
              <span className="text-soft">
                {standing} {standing === 1 ? 'stands' : 'stand'},{' '}
                {content.weakens.filter((w) => w.state === 'answered').length} answered
              </span>
            }
          >
            <Weakens weakens={content.weakens} />
          </Section>
          {data.state === 'drafting' ? (
            <CaseActs
              detail={data}
              supportedMonths={content.supportedMonths}
              mayPutForward={mayPutForward}
              onDone={() => mutate()}
            />
          ) : null}
          {data.state === 'put forward' && maySign ? (
            <SignPanel
              detail={data}
              whyNot={whyNotSign}
              demoPassword={demoPassword}
              onDone={() => mutate()}
            />
          ) : null}
          {data.contentSha256 && data.content && (data.state !== 'put forward' || !maySign) ? (
            <SignatureBox detail={data} zone={content.lab.timeZone} />
          ) : null}
        </aside>
      </div>
    </>
  )
}
