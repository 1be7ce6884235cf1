'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Empty } from '@/components/ui/empty'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { TakeReadyMade } from '@/components/protocol/take-ready-made'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { freeIn } from '@/lib/study/rules/stations'
import { counted } from '@/lib/study/rules/words'
import { studyKeys } from '@/lib/study/keys'
import { grouped } from '@/lib/number/rules'
import { BatchChoice } from './batch-choice'
import { InitialFields } from './initial-fields'
import { NeedPart } from './need-part'
import { StartCalendar } from './start-calendar'
import { Savings } from './savings'
import { StationChoices } from './station-choices'
import {
  bodyOf,
  countedBatches,
  type Draft,
  emptyDraft,
  type Need,
  needsOf,
  type Offer,
  placesOf,
  planOf,
  savingsFor,
  type StartPlace,
  whyNot,
} from './start-state'

type Props = { offer: Offer; batchCode: string | null; protocolCode: string | null }

/** From batch and protocol to standing jars: what it takes is drawn while one chooses. */
export function StartStudyForm({ offer, batchCode, protocolCode }: Props) {
  const router = useRouter()
  const [id] = useState(newId)
  const [draft, setDraft] = useState<Draft>(() => ({
    ...emptyDraft,
    batchIds: offer.batches.filter((batch) => batch.code === batchCode).map((batch) => batch.id),
    protocolVersionId: offer.protocols.find((one) => one.code === protocolCode)?.versionId ?? '',
  }))
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const set = (change: Partial<Draft>) => setDraft((before) => ({ ...before, ...change }))
  const plan = planOf(offer, draft)
  const needs = needsOf(offer, draft)
  const short = needs.find((need) => !need.fits)
  const full = placesOf(offer, draft).find((place) => place.isFull)
  const fields = error instanceof ClientError ? error.fields : {}
  const chosen = offer.protocols.find((one) => one.versionId === draft.protocolVersionId)
  const isUnapproved = chosen !== undefined && chosen.state !== 'approved'

  async function start() {
    setBusy(true)
    setError(null)
    try {
      const made = await send<{ code: string; jars: number }>(
        studyKeys.start,
        'POST',
        bodyOf(id, offer, draft),
      )
      toast(`${made.code} runs: ${made.jars} jars stand`)
      router.push(`/studies/${encodeURIComponent(made.code)}/jars`)
    } catch (thrown) {
      setError(thrown)
      setBusy(false)
    }
  }

  if (offer.batches.length === 0) {
    return (
      <>
        <Heading crumb="Studies" headline="No batch is released yet" />
        <Empty
          title="A study begins with a batch"
          sentence="Make one from a formula, weigh it, test its emulsion type and release it."
          act={
            <LinkButton href="/batches" kind="primary">
              Open the batches
            </LinkButton>
          }
        />
      </>
    )
  }
  return (
    <>
      <Heading
        crumb="Studies, a new one"
        headline={<Headline needs={needs} short={short} full={full} />}
        sentence="Starting makes the jars, their labels, their places and the calendar of pulls."
      />
      <div className="mt-6 grid gap-x-12 gap-y-8 xl:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="grid content-start gap-8">
          <Section title="What">
            <div className="grid gap-4">
              <BatchChoice offer={offer} draft={draft} set={set} />
              <div className="flex flex-wrap items-end gap-3">
                <Select
                  label="Protocol"
                  empty="Choose a protocol"
                  value={draft.protocolVersionId}
                  options={offer.protocols.map((one) => ({
                    value: one.versionId,
                    label: `${one.code}, version ${one.number}: ${one.name}`,
                  }))}
                  onPick={(protocolVersionId) => set({ protocolVersionId, stationIds: {}, adjustments: {} })}
                  wrap="flex-1 min-w-[240px]"
                />
                <TakeReadyMade
                  onTaken={(protocolVersionId) => {
                    set({ protocolVersionId, stationIds: {}, adjustments: {} })
                    router.refresh()
                  }}
                />
              </div>
              {isUnapproved ? (
                <p className="text-15">
                  QA has not approved this version: a study that starts on it cannot carry a signed shelf
                  life.
                </p>
              ) : null}
              <Field
                label="Title"
                value={draft.title}
                placeholder={chosen?.name}
                onText={(title) => set({ title })}
                error={fields['title']}
              />
              <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
                <Select
                  label="Client"
                  empty="None, the lab's own"
                  value={draft.clientId}
                  options={offer.clients.map((client) => ({ value: client.id, label: client.name }))}
                  onPick={(clientId) => set({ clientId })}
                  wrap="min-w-[240px]"
                />
                {draft.clientId ? (
                  <Checkbox
                    label="Share it with the client"
                    checked={draft.isShared}
                    onChange={(event) => set({ isShared: event.target.checked })}
                  />
                ) : null}
              </div>
            </div>
          </Section>
          {plan ? <StationChoices {...{ offer, draft, set, fields }} endWeeks={plan.endWeeks} /> : null}
          {plan ? <StartCalendar plan={plan} taken={countedBatches(draft)} lab={offer.lab} /> : null}
        </div>
        <div className="grid content-start gap-8">
          {needs.map((need) => (
            <NeedPart key={need.batch.id} need={need} />
          ))}
          <Savings
            savings={savingsFor(offer, draft)}
            adjustments={draft.adjustments}
            onChange={(adjustments) => set({ adjustments })}
          />
          {plan && draft.batchIds.length > 0 ? (
            <InitialFields offer={offer} draft={draft} plan={plan} set={set} fields={fields} />
          ) : null}
          <div className="grid gap-3">
            <ErrorNote error={error} />
            <div>
              <Button kind="primary" busy={busy} why={whyNot(offer, draft)} onClick={start}>
                Start the study
              </Button>
            </div>
          </div>
        </div>
      </div>
    </>
  )
}

function Headline({
  needs,
  short,
  full,
}: {
  needs: Need[]
  short: Need | undefined
  full: StartPlace | undefined
}) {
  if (short) {
    return (
      <>
        <b>{grouped(Math.ceil(short.shortG), 0)} g</b> are missing, so this study cannot start
      </>
    )
  }
  if (full?.station && needs.length > 0) {
    const missing = full.needed - freeIn(full.station)
    return (
      <>
        <b>{counted(missing, 'place')}</b> {missing === 1 ? 'is' : 'are'} missing at {full.station.name}, so
        this study cannot start as it is
      </>
    )
  }
  const jars = needs.reduce((sum, need) => sum + need.jars, 0)
  if (jars === 0) return <>Choose a batch and what it goes through</>
  return (
    <>
      <b>{jars} jars</b> will stand
    </>
  )
}
