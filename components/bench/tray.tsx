import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { JarGlyph } from '@/components/marks/jar-glyph'

/** The bracket under jars that are still only on this tablet; nothing is shown while all is on the server. */
export function Tray({ outbox }: { outbox: OutboxOnScreen }) {
  const { items: kept, isOnline, flush } = outbox
  const refused = kept.filter((item) => item.refusal !== null).length
  if (isOnline && kept.length === 0) return null
  return (
    <button
      type="button"
      onClick={() => void flush()}
      className="flex min-h-[66px] items-center gap-4 rounded bg-ink px-4 text-left text-onink"
      aria-label={`${isOnline ? 'Network is back' : 'No network'}. ${kept.length} jars kept on this tablet. Press to send them now.`}
    >
      {kept.length > 0 ? (
        <span aria-hidden className="flex items-end gap-1 border-x-2 border-b-2 border-onink px-1.5 pb-1">
          {kept.slice(0, 5).map((k) => (
            <span key={k.id} className="h-5 w-3.5 border-2 border-t-4 border-onink" />
          ))}
        </span>
      ) : null}
      <span className="leading-tight" role="status">
        <b className="block text-18">{isOnline ? (refused > 0 ? 'Not taken' : 'Sending') : 'No network'}</b>
        <span className="text-17">
          {refused > 0
            ? `${refused} to look at again`
            : kept.length === 0
              ? 'entries wait here'
              : `${kept.length} ${kept.length === 1 ? 'jar' : 'jars'} kept here`}
        </span>
      </span>
    </button>
  )
}

export function TinyJar({
  standing,
  layers,
  state,
  height = 34,
  title,
}: {
  standing: 'steady' | 'leaning' | 'out' | 'untold'
  layers: { topPercent: number; bottomPercent: number } | null
  state: 'due' | 'resting' | 'done' | 'missed'
  height?: number
  title?: string
}) {
  return (
    <JarGlyph
      height={height}
      state={state === 'done' ? 'drawn' : state}
      posture={
        state !== 'done'
          ? 'upright'
          : standing === 'out'
            ? 'lying'
            : standing === 'leaning'
              ? 'leaning'
              : 'upright'
      }
      topPercent={layers?.topPercent ?? 0}
      bottomPercent={layers?.bottomPercent ?? 0}
      {...(title ? { title } : {})}
    />
  )
}
