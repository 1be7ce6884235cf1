'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import { sentenceOf } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'
import type { ProtocolPage } from '@/lib/protocol/queries'
import { missingInPlan } from '@/lib/protocol/rules/faults'
import { priceOf } from '@/lib/protocol/rules/matrixing'
import { jarsOfPlan, weeksOfPlan } from '@/lib/protocol/rules/plan'
import { protocolKeys } from '@/lib/protocol/keys'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { ApproveVersion } from './approve-version'
import { AttributeList } from './attribute-list'
import { PlanEditor } from './plan-editor'
import { PlanGrid } from './plan-grid'
import { Changes, StationWords } from './plan-words'
import { Price } from './read-less'

type Props = {
  protocol: ProtocolPage
  number: number | null
  mayWrite: boolean
  mayStart: boolean
  /** Who looks, where they may approve. */
  approver: string | null
}

/** One version of a protocol: its shelves, what is measured, and who follows it. */
export function ProtocolView({ protocol, number, mayWrite, mayStart, approver }: Props) {
  const router = useRouter()
  const shown = protocol.versions.find((one) => one.number === number) ?? protocol.versions[0]!
  const [isEditing, setIsEditing] = useState(false)
  const newest = protocol.versions[0]!
  const studies = protocol.studies.filter((study) => study.number === shown.number)
  const missing = missingInPlan(shown.plan)
  const before = protocol.versions.find((one) => one.number === shown.number - 1)

  async function begin() {
    try {
      const made = await send<{ number: number }>(protocolKeys.versions(protocol.code), 'POST', {
        id: newId(),
      })
      toast(`Version ${made.number} of ${protocol.code} begins as a copy`)
      router.push(`/protocols/${protocol.code}`)
      router.refresh()
    } catch (error) {
      toast(sentenceOf(error).sentence, { isAlarm: true })
    }
  }

  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/protocols">Protocols</Link>, {protocol.code}, version {shown.number},{' '}
            {stateWords(shown)}
          </>
        }
        headline={<Headline plan={shown.plan} name={protocol.name} />}
        sentence={missing ?? takes(shown.plan)}
        tabsLabel="Versions"
        tabs={
          protocol.versions.length > 1
            ? protocol.versions.map((version) => ({
                href: `/protocols/${protocol.code}?version=${version.number}`,
                label: `Version ${version.number}`,
                isHere: version.number === shown.number,
              }))
            : undefined
        }
        acts={
          <>
            {mayWrite && shown.state === 'draft' && !isEditing ? (
              <Button onClick={() => setIsEditing(true)}>Change the plan</Button>
            ) : null}
            {mayWrite && newest.state !== 'draft' ? (
              <Button onClick={begin}>Begin a new version</Button>
            ) : null}
            {approver && shown.state !== 'approved' && !isEditing ? (
              <ApproveVersion code={protocol.code} version={shown} approver={approver} missing={missing} />
            ) : null}
            {mayStart && shown.number === newest.number && !missing ? (
              <LinkButton href={`/studies/new?protocol=${protocol.code}`} kind="primary">
                Start a study
              </LinkButton>
            ) : null}
          </>
        }
      />
      <div className="mt-6 grid gap-8">
        {isEditing ? (
          <PlanEditor
            code={protocol.code}
            name={protocol.name}
            version={shown}
            onLeave={() => setIsEditing(false)}
            onSaved={() => {
              setIsEditing(false)
              router.refresh()
            }}
          />
        ) : (
          <>
            <Section title="Stations and time points">
              <PlanGrid plan={shown.plan} />
              <StationWords plan={shown.plan} />
            </Section>
            <Section title="Attributes">
              <AttributeList attributes={shown.plan.attributes} />
            </Section>
            <Section title="Jars and rest">
              <p>{jarWords(shown.plan)}</p>
              {shown.note ? <p className="mt-2">{shown.note}</p> : null}
            </Section>
            {priceOf(shown.plan).length > 0 ? (
              <Section title="Read less">
                <Price plan={shown.plan} />
              </Section>
            ) : null}
            {before ? (
              <Section title={`Changed since version ${before.number}`}>
                <Changes before={before.plan} after={shown.plan} />
              </Section>
            ) : null}
          </>
        )}
        {studies.length > 0 ? (
          <Section title="Followed by">
            <ul className="flex flex-wrap gap-x-6 gap-y-2">
              {studies.map((study) => (
                <li key={study.code}>
                  <Link href={`/studies/${study.code}`} className="underline underline-offset-4">
                    {study.code}
                  </Link>{' '}
                  {study.title}
                  {study.state === 'closed' ? ', ended' : ''}
                </li>
              ))}
            </ul>
          </Section>
        ) : null}
      </div>
    </>
  )
}

function stateWords({ state, approvedBy, approvedAt }: ProtocolPage['versions'][number]): string {
  if (state === 'approved') return `approved by ${approvedBy}, ${spokenDay(approvedAt!)}`
  return `${state === 'draft' ? 'a draft' : 'locked'}, not approved by QA`
}

function Headline({ plan, name }: { plan: ProtocolPlan; name: string }) {
  const { jars } = jarsOfPlan(plan, 1)
  return (
    <>
      {name}: <b>{counted(jars, 'jar')}</b> a batch
    </>
  )
}

function takes(plan: ProtocolPlan): string {
  const { grams } = jarsOfPlan(plan, 1)
  const weeks = weeksOfPlan(plan)
  return `They take ${Math.ceil(grams)} g with ${plan.lossPercent} % loss. ${capital(counted(plan.stations.length, 'station'))}, ${counted(weeks.length, 'time point')} from week ${weeks[0]} to week ${weeks.at(-1)}.`
}

function jarWords(plan: ProtocolPlan): string {
  const rest =
    plan.restHours === 0
      ? 'A measuring jar is read at once'
      : `A measuring jar rests ${plan.restHours} h closed before it is read`
  const outside = (plan.setAside ?? []).map(({ what, jars }) => `, ${jars} set aside for ${what}`).join('')
  const own = plan.ownPack ? ` The product's own pack: ${plan.ownPack}.` : ''
  return `${plan.fillG} g in each jar, filled ${plan.fillHeightMm} mm high. ${capital(plan.pack || 'no pack is named')}. ${plan.initialJars} for the initial, ${plan.retains} retained${outside}. ${rest}.${own}`
}
