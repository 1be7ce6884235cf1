'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { RadioGroup } from '@/components/ui/radio-group'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import type { FlagPage } from '@/lib/flag/queries/one'
import { flagCauses, type FlagCause } from '@/lib/flag/schema'
import { spokenDay } from '@/lib/study/rules/calendar'
import {
  actionText,
  answerRequest,
  emptyAnswer,
  laboratoryCauses,
  settlings,
  usualActs,
  type Settling,
} from './answer-state'
import { causeWords } from './flag-words'
import type { FlagRights } from './rights'
import { isStale, Stale } from './stale'
import { useFlagAct } from './use-flag-act'

type Props = { flag: FlagPage; rights: FlagRights; onDone: () => void; onStale: () => void }

/** Cause, why, and what is done about it; of a doubt also whether its reading counts. */
export function AnswerForm({ flag, rights, onDone, onStale }: Props) {
  const [state, setState] = useState(emptyAnswer)
  // What this person has seen: a newer one must not be answered unread.
  const [version, setVersion] = useState(flag.version)
  const { act, isSending, fields, error } = useFlagAct()
  const put = (part: Partial<typeof state>) => setState({ ...state, ...part })
  const choices = settlings(flag, rights.mayCloseOut)
  const causes = state.settling === 'reading' ? laboratoryCauses : flagCauses
  const isClosed = flag.state === 'closed'

  async function submit(event: FormEvent) {
    event.preventDefault()
    const refused = await act({
      ...answerRequest(flag, state, version),
      what: `answer to flag ${flag.number}`,
      text: [state.why, state.settling === 'answer' ? actionText(state) : ''].filter(Boolean).join(' '),
      onDone: () => {
        toast(doneWords(flag, state.settling, rights))
        onDone()
      },
    })
    if (refused && isStale(refused)) {
      setVersion(refused.detail.version)
      onStale()
    } else if (refused?.status === 409) onStale()
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      {choices.length > 1 ? (
        <RadioGroup
          label="What becomes of it"
          layout="ledger"
          value={state.settling}
          onPick={(settling) =>
            put({
              settling: settling as Settling,
              cause: settling === 'reading' && !laboratoryCauses.includes(state.cause!) ? null : state.cause,
            })
          }
          options={choices.map((choice) => ({ value: choice, ...settlingWords(choice, flag) }))}
        />
      ) : null}
      <RadioGroup
        label="Cause"
        layout="ledger"
        value={state.cause}
        onPick={(cause) => put({ cause: cause as FlagCause })}
        error={fields['cause']}
        options={causes.map((cause) => ({
          value: cause,
          label: causeWords[cause],
          hint: causeHint(cause, flag),
        }))}
      />
      <TextArea
        label="Why you think so"
        rows={4}
        value={state.why}
        onText={(why) => put({ why })}
        error={fields['why']}
      />
      {state.settling === 'answer' ? (
        <fieldset className="min-w-0">
          <legend className="text-15 font-600">Action</legend>
          {usualActs(flag).map(({ text, hint }) => (
            <Checkbox
              key={text}
              label={text}
              hint={hint}
              checked={state.picked.includes(text)}
              onSet={(isOn) =>
                put({ picked: isOn ? [...state.picked, text] : state.picked.filter((one) => one !== text) })
              }
            />
          ))}
          <Field
            label="Something else"
            hideLabel
            placeholder="Something else"
            value={state.other}
            onText={(other) => put({ other })}
            error={fields['action']}
            wrap="mt-1"
          />
        </fieldset>
      ) : null}
      {error ? isStale(error) ? <Stale error={error} /> : <ErrorNote error={error} /> : null}
      <Button
        type="submit"
        kind="primary"
        busy={isSending}
        className="w-full"
        why={isClosed ? 'It is closed now. What you wrote can still go into a comment.' : undefined}
      >
        {sendWords(flag, state.settling)}
      </Button>
      {isClosed ? null : <p className="text-13 text-soft">{footWords(flag, state.settling, rights)}</p>}
    </form>
  )
}

function settlingWords(choice: Settling, flag: FlagPage) {
  switch (choice) {
    case 'doubt':
      return { label: 'Set the doubt aside', hint: 'it counts' }
    case 'reading':
      return {
        label: flag.onDay ? 'Set the day’s readings aside' : 'Set the reading aside',
        hint: 'it never counts',
      }
    case 'answer':
      return flag.level === 'doubt'
        ? { label: 'Keep the doubt', hint: 'a repeat decides' }
        : { label: 'Answer it', hint: 'the reading stays' }
  }
}

function causeHint(cause: FlagCause, flag: FlagPage): string | undefined {
  switch (cause) {
    case 'measurement':
      return 'conditions, operator'
    case 'instrument':
      if (!flag.instrumentCode) return undefined
      return flag.calibrationDueOn
        ? `${flag.instrumentCode}, due ${spokenDay(flag.calibrationDueOn, false)}`
        : flag.instrumentCode
    case 'station':
      return flag.stationName?.toLowerCase()
    default:
      return undefined
  }
}

function sendWords(flag: FlagPage, settling: Settling): string {
  if (settling === 'doubt') return 'Set the doubt aside'
  if (settling === 'reading') return flag.onDay ? 'Set the day’s readings aside' : 'Set the reading aside'
  return `Answer flag ${flag.number}`
}

function footWords(flag: FlagPage, settling: Settling, { mayCloseOut }: FlagRights): string {
  if (settling === 'doubt') return 'The reading counts from now on, and the series is computed anew.'
  if (settling === 'reading') return 'It stays on record and in the plots, and never counts.'
  if (flag.needsQuality && !mayCloseOut) return 'Out at a station that decides: QA closes it after you.'
  return flag.level === 'out' || flag.level === 'leaning'
    ? `${flag.level === 'out' ? 'Out' : 'Leaning'}: your answer closes it.`
    : 'Your answer closes it.'
}

function doneWords(flag: FlagPage, settling: Settling, { mayCloseOut }: FlagRights): string {
  if (settling === 'doubt') return `The doubt of flag ${flag.number} is set aside; its reading counts.`
  if (settling === 'reading') return `Set aside: what flag ${flag.number} rests on never counts.`
  return flag.needsQuality && !mayCloseOut
    ? `Flag ${flag.number} is answered; QA closes it.`
    : `Flag ${flag.number} is answered and closed.`
}
