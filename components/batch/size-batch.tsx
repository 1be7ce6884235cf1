'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Empty } from '@/components/ui/empty'
import { ErrorNote } from '@/components/ui/error-note'
import { FigureDetails } from '@/components/ui/figure-details'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { NumberField } from '@/components/ui/number-field'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { gramsOf, sizeFor, usualYieldPercent } from '@/lib/batch/rules/size'
import { newId } from '@/lib/db/id'
import { grouped, readDecimal } from '@/lib/number/rules'
import { ClientError, send } from '@/lib/http/fetcher'
import { usualWeighingTolerancePercent } from '@/lib/lab/rules'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { totalGrams } from '@/lib/science/making'
import { sizeFacts } from './size-facts'
import { GramsDrawn } from './grams-drawn'

type Props = {
  formulas: { code: string; name: string; versionId: string; versionNumber: number; state: string }[]
  protocols: { code: string; name: string; versionId: string; number: number; plan: ProtocolPlan }[]
  formulaCode: string | null
}

/** A batch of a size one types, or enough for the studies one means to start: it shows where the grams go. */
export function SizeBatch({ formulas, protocols, formulaCode }: Props) {
  const router = useRouter()
  const [id] = useState(newId)
  const [versionId, setVersionId] = useState(
    formulas.find((one) => one.code === formulaCode)?.versionId ?? '',
  )
  const [picked, setPicked] = useState<string[]>([])
  const [typed, setTyped] = useState({ size: '', yield: String(usualYieldPercent), tolerance: '' })
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)
  const set = (change: Partial<typeof typed>) => setTyped((now) => ({ ...now, ...change }))
  const plans = protocols.filter((one) => picked.includes(one.versionId))
  const yieldPercent = readDecimal(typed.yield) ?? 0
  const enough = sizeFor(
    plans.map((one) => one.plan),
    yieldPercent,
  )
  const narrowest = plans
    .flatMap(({ plan }) => plan.weighingTolerancePercent ?? [])
    .toSorted((a, b) => a - b)[0]
  const sizeText = typed.size.trim() || (enough === null ? '' : String(enough))
  const sizeG = readDecimal(sizeText)
  const needs = plans.map((one) => ({ name: one.name, ...gramsOf(one.plan) }))
  const neededG = totalGrams(needs.map((need) => need.grams))

  async function make() {
    setIsSending(true)
    setRefusal(null)
    try {
      const tolerancePercent = typed.tolerance.trim()
        ? (readDecimal(typed.tolerance) ?? typed.tolerance)
        : null
      const body = {
        ...{ id, formulaVersionId: versionId, sizeG: sizeG ?? sizeText, tolerancePercent },
        protocolVersionIds: plans.map((one) => one.versionId),
      }
      const batch = await send<{ code: string }>('/api/batches', 'POST', body, { key: id })
      router.push(`/batches/${batch.code}`)
    } catch (thrown) {
      setIsSending(false)
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    }
  }

  if (!formulas.length) {
    return (
      <Empty
        title="No formula is here yet"
        sentence="A batch is made from a formula."
        act={<LinkButton href="/formulas/new">Write a formula</LinkButton>}
      />
    )
  }
  const fields = refusal?.fields ?? {}
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/batches">Batches</Link> · Size a batch
          </>
        }
        headline={
          enough === null ? (
            'Enough of it for the studies to come'
          ) : (
            <>
              <b>
                <FigureDetails
                  figure={`${grouped(enough, 0)} g`}
                  facts={() => sizeFacts(enough, neededG, yieldPercent, needs)}
                />
              </b>{' '}
              are enough for {needs.reduce((sum, need) => sum + need.jars, 0)} jars
            </>
          )
        }
        sentence={
          sizeG !== null && enough !== null && sizeG < enough
            ? `${grouped(sizeG, 0)} g are ${grouped(enough - sizeG, 0)} g too few for what is chosen.`
            : 'Choose the protocols that will start on it, or type a size.'
        }
      />
      <div className="mt-6 grid gap-x-12 gap-y-8 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="flex flex-col gap-4">
          <Select
            label="Formula"
            empty="Choose"
            value={versionId}
            error={fields['formulaVersionId']}
            options={formulas.map((one) => ({
              value: one.versionId,
              label: `${one.code}, ${one.name}, version ${one.versionNumber}`,
            }))}
            onPick={setVersionId}
            hint={
              formulas.find((one) => one.versionId === versionId)?.state === 'draft'
                ? 'A draft: the batch locks it, and what changes later goes into a new version.'
                : undefined
            }
          />
          <fieldset>
            <legend className="text-15 font-600">Enough for</legend>
            {protocols.map((one) => (
              <Checkbox
                key={one.versionId}
                label={`${one.name}, version ${one.number}`}
                hint={`${grouped(gramsOf(one.plan).grams, 0)} g in ${gramsOf(one.plan).jars} jars`}
                checked={picked.includes(one.versionId)}
                onSet={(isOn) =>
                  setPicked((now) =>
                    isOn ? [...now, one.versionId] : now.filter((other) => other !== one.versionId),
                  )
                }
              />
            ))}
            {protocols.length ? null : <p className="text-15 text-soft">No protocol is written yet.</p>}
          </fieldset>
          <div className="grid grid-cols-2 gap-4 sm:grid-cols-3">
            <NumberField
              label="Expected yield"
              unit="%"
              value={typed.yield}
              hint="Of what is weighed in; the rest stays in the vessel."
              onText={(text) => set({ yield: text })}
            />
            <NumberField
              label="Batch size"
              unit="g"
              value={typed.size}
              placeholder={enough === null ? '' : String(enough)}
              error={fields['sizeG']}
              hint={enough === null ? undefined : 'Empty takes what is enough.'}
              onText={(size) => set({ size })}
            />
            <NumberField
              label="Tolerance"
              unit="%"
              value={typed.tolerance}
              error={fields['tolerancePercent']}
              placeholder={narrowest === undefined ? '' : String(narrowest)}
              hint={
                narrowest === undefined
                  ? `Of each weight; empty takes the lab’s, ${usualWeighingTolerancePercent} % if it says nothing.`
                  : `Of each weight; empty takes ${narrowest} % as the protocol asks.`
              }
              onText={(tolerance) => set({ tolerance })}
            />
          </div>
          <ErrorNote error={refusal && !Object.keys(fields).length ? refusal : null} />
          <div>
            <Button
              kind="primary"
              busy={isSending}
              why={
                !versionId
                  ? 'Choose the formula.'
                  : sizeText
                    ? undefined
                    : 'Choose a protocol or type a size.'
              }
              onClick={() => void make()}
            >
              {sizeG === null ? 'Make the batch' : `Make ${grouped(sizeG, 0)} g`}
            </Button>
          </div>
        </div>
        <Section
          title="Where the grams go"
          sentence={
            needs.length
              ? 'Each with what filling loses; the last is what stays in the vessel.'
              : 'Drawn once a protocol is chosen.'
          }
        >
          {enough !== null ? (
            <GramsDrawn needs={needs} sizeG={Math.max(sizeG ?? 0, enough)} neededG={neededG} />
          ) : null}
        </Section>
      </div>
    </>
  )
}
