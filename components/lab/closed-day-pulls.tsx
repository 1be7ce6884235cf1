'use client'

import Link from 'next/link'
import { useState } from 'react'
import useSWR, { useSWRConfig } from 'swr'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { toast } from '@/components/ui/toast'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { ClosedDayPull } from '@/lib/pull/queries/on-closed-days'
import { pullKeys } from '@/lib/pull/keys'
import { spokenDay } from '@/lib/study/rules/calendar'
import { degrees } from '@/lib/study/rules/finding'
import { capital, counted, listed, withVariant } from '@/lib/study/rules/words'
import { namedDay } from '@/lib/study/rules/working-days'
import { workloadKey } from '@/lib/study/keys'

/** Planned pulls of running studies on days on which nobody is there, and the offer to move them inside their windows. */
export function ClosedDayPulls({ mayMove }: { mayMove: boolean }) {
  const { data: pulls = [], mutate } = useSWR<ClosedDayPull[], ClientError>(pullKeys.moves, fetcher)
  const { mutate: mutateOther } = useSWRConfig()
  const [left, setLeft] = useState<Set<string>>(new Set())
  const [reason, setReason] = useState<string | null>(null)
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  if (pulls.length === 0) return null
  const chosen = pulls.filter((pull) => pull.to !== null && !left.has(pull.pullId))
  const stuck = pulls.filter((pull) => pull.to === null)
  const why = reason ?? reasonOf(chosen)

  async function move() {
    setSending(true)
    setError(null)
    try {
      const moves = chosen.map(({ pullId, dueOn, to }) => ({ pullId, from: dueOn, to }))
      await keep(() => send(pullKeys.moves, 'POST', { moves, reason: why }), {
        what: 'pulls moved off closed days',
        text: why,
      })
      toast(`${counted(moves.length, 'pull')} moved; the record says from where and why`)
      setReason(null)
      await mutate()
      void mutateOther(workloadKey)
    } catch (thrown) {
      setError(thrown)
      if (thrown instanceof ClientError && thrown.status === 409) void mutate()
    } finally {
      setSending(false)
    }
  }

  return (
    <Section
      title="Pulls on closed days"
      sentence={`Nothing moves by itself. A pull keeps its time point and its window; only the day on which it is planned changes.${stuck.length > 0 ? ` ${capital(counted(stuck.length, 'pull has', 'pulls have'))} no working day inside the window and can only be pulled on the day, or missed with a reason.` : ''}`}
    >
      <Ledger
        caption="Planned pulls on days on which the lab does not work"
        rows={pulls}
        rowKey={(row) => row.pullId}
        columns={[
          {
            key: 'pick',
            title: <span className="sr-only">Move</span>,
            width: '44px',
            cell: (row) =>
              row.to === null || !mayMove ? null : (
                <span className="-my-1.5 block">
                  <Checkbox
                    label={
                      <span className="sr-only">{`Move ${row.studyCode}, ${row.label}, ${placeOf(row)}`}</span>
                    }
                    checked={!left.has(row.pullId)}
                    onSet={(isOn) => {
                      const next = new Set(left)
                      if (isOn) next.delete(row.pullId)
                      else next.add(row.pullId)
                      setLeft(next)
                    }}
                  />
                </span>
              ),
          },
          {
            key: 'pull',
            title: 'pull',
            cell: (row) => (
              <>
                <Link
                  href={`/studies/${encodeURIComponent(row.studyCode)}`}
                  className="font-650 underline underline-offset-4"
                >
                  {row.studyCode}
                </Link>{' '}
                {row.label}, {placeOf(row)}
              </>
            ),
          },
          {
            key: 'on',
            title: 'planned on',
            cell: (row) => (
              <>
                {namedDay(row.dueOn)}
                {/^\w+day$/.test(row.because) ? '' : `, ${row.because}`}
              </>
            ),
          },
          {
            key: 'window',
            title: 'window',
            from: 'tablet',
            cell: (row) => `${spokenDay(row.windowFrom, false)} to ${spokenDay(row.windowTo, false)}`,
          },
          {
            key: 'to',
            title: 'could move to',
            cell: (row) =>
              row.to === null ? (
                'no working day in the window'
              ) : (
                <b className="font-650">{namedDay(row.to)}</b>
              ),
          },
        ]}
      />
      {mayMove && pulls.some((pull) => pull.to !== null) ? (
        <div className="mt-4 flex flex-wrap items-end gap-3">
          <Field
            label="Why they move"
            value={why}
            onText={setReason}
            wrap="flex-1 min-w-[260px] max-w-[560px]"
          />
          <Button
            busy={isSending}
            why={
              chosen.length === 0
                ? 'No pull is chosen.'
                : why.trim() === ''
                  ? 'Say why they move.'
                  : undefined
            }
            onClick={() => void move()}
          >
            Move {counted(chosen.length, 'pull')}
          </Button>
        </div>
      ) : null}
      <div className="mt-3">
        <ErrorNote error={error} />
      </div>
    </Section>
  )
}

function placeOf(pull: ClosedDayPull): string {
  const name = pull.isFreezeThaw
    ? 'freeze-thaw'
    : pull.temperatureC === null
      ? pull.stationName
      : degrees(pull.temperatureC)
  return withVariant(name, pull.variant)
}

function reasonOf(pulls: ClosedDayPull[]): string {
  const names = [...new Set(pulls.map((pull) => pull.because))]
  return names.length === 0
    ? ''
    : `Closed: ${listed(names.slice(0, 6))}${names.length > 6 ? ' and more' : ''}`
}
