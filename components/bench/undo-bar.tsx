'use client'

import { useEffect, useState } from 'react'
import { mutate } from 'swr'
import { setLastSave, useLastSave, type LastSave } from '@/components/bench/last-save'
import { sentenceOf } from '@/components/ui/error-note'
import { useDevice } from '@/components/device/device-context'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { benchKeys } from '@/lib/bench/keys'
import { fetcher, send } from '@/lib/http/fetcher'
import { undoSeconds } from '@/lib/pull/rules/undo-seconds'
import { percentOf } from '@/lib/science/percent'
import { pullKeys } from '@/lib/pull/keys'

type Props = {
  outbox: OutboxOnScreen
  onOpen: (code: string) => void
  /** Back at the instrument, with this jar in hand. */
  onCall: (code: string) => void
  onChange: () => Promise<unknown>
}

/** After the jump to the next jar: what was kept, so long it can be taken back, and which spare jar it calls for. */
export function UndoBar(props: Props) {
  const save = useLastSave()
  return save ? <Bar key={save.at} save={save} {...props} /> : null
}

function Bar({ save, outbox, onOpen, onCall, onChange }: Props & { save: LastSave }) {
  const left = useSecondsLeft(save.at)
  const drafts = useDevice()?.drafts
  const [says, setSays] = useState('')
  const [isBusy, setBusy] = useState(false)
  const { jar, part, repeats } = save
  const isOver = left <= 0
  const waiting = outbox.items.find((item) => item.draft?.key === save.draftKey)
  // What was not taken is decided in the tray.
  const isRefused = waiting !== undefined && waiting.refusal !== null

  useEffect(() => {
    if (isRefused || (isOver && repeats.length === 0 && says === '')) setLastSave(null)
  }, [isRefused, isOver, repeats.length, says])

  async function undo() {
    setBusy(true)
    try {
      if (waiting) await outbox.drop(waiting)
      else await send(pullKeys.undo(jar.pullJarId), 'POST', { readings: save.readings })
      // A reading's id belongs to what was voided; what is typed on gets ids of its own.
      const { at: _at, ...typed } = save.draft
      drafts?.change(save.draftKey, () => ({ ...typed, ids: {}, confirmed: [] }))
      if (!waiting)
        await mutate(benchKeys.jar(jar.code), fetcher(benchKeys.jar(jar.code)), { revalidate: false })
      const refreshed = onChange()
      // By instrument, a jar is in hand once the Bench asks for it again.
      if (part) await refreshed
      setLastSave(null)
      if (!part) return onOpen(jar.code)
      drafts?.change('walk.step', (now) => ({ photographed: [], ...(now as object), key: part.key }))
      onCall(jar.code)
    } catch (thrown) {
      setSays(sentenceOf(thrown).sentence)
      setBusy(false)
    }
  }

  return (
    <div className="bg-ink text-onink" data-screen-only>
      <div className="mx-auto flex max-w-[1440px] flex-wrap items-center gap-x-5 gap-y-1 px-4 sm:px-7">
        <p role="status" className="min-w-0 flex-1 py-2 text-18">
          <b>
            {save.isKeptHere && waiting ? 'Kept on this tablet: ' : 'Kept: '}
            {part ? `${part.label} of ${jar.name}` : jar.name}
          </b>
          {save.isKeptHere && waiting ? '. It goes out when the network is back.' : ''}
          {says ? <span className="block">{says}</span> : null}
          {repeats.map((repeat) => (
            <span key={repeat.pullJarId} className="block">
              Measure a second jar: spare <b>{repeat.name}</b>, {jar.stationName}
              {repeat.shelf === null ? '' : `, shelf ${repeat.shelf}, place ${repeat.place}`}
            </span>
          ))}
        </p>
        {repeats.map((repeat) => (
          <BarButton
            key={repeat.pullJarId}
            onPress={() => {
              setLastSave(null)
              onOpen(repeat.jarCode)
            }}
          >
            Open {repeat.jarCode}
          </BarButton>
        ))}
        {isOver ? (
          <BarButton onPress={() => setLastSave(null)}>Close</BarButton>
        ) : (
          <BarButton onPress={() => void undo()} isBusy={isBusy}>
            Undo <span className="tabular-nums">{left} s</span>
          </BarButton>
        )}
      </div>
      <div
        aria-hidden
        className="h-1 bg-onink"
        style={{ width: `${percentOf(Math.max(0, left), undoSeconds)}%` }}
      />
    </div>
  )
}

type ButtonProps = { onPress: () => void; isBusy?: boolean; children: React.ReactNode }

function BarButton({ onPress, isBusy = false, children }: ButtonProps) {
  return (
    <button
      type="button"
      aria-disabled={isBusy || undefined}
      onClick={isBusy ? undefined : onPress}
      className="min-h-16 rounded px-4 text-20 font-700 underline underline-offset-4 outline-onink"
    >
      {children}
    </button>
  )
}

function useSecondsLeft(since: number): number {
  const [left, setLeft] = useState(undoSeconds)
  useEffect(() => {
    const timer = setInterval(() => setLeft(Math.ceil(undoSeconds - (Date.now() - since) / 1000)), 500)
    return () => clearInterval(timer)
  }, [since])
  return left
}
