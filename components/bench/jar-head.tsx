import { Tray } from '@/components/device/tray'
import type { OutboxOnScreen } from '@/components/device/use-outbox'
import { LightSwitch } from '@/components/bench/light-switch'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { capital } from '@/lib/study/rules/words'

export function JarHead({
  jar,
  outbox,
  onWalk,
}: {
  jar: BenchJarPage
  outbox: OutboxOnScreen
  onWalk: () => void
}) {
  return (
    <header className="flex items-center gap-3 max-lg:[&_[data-bracket]]:hidden px-4 py-3 sm:gap-5 sm:px-5 sm:py-4">
      <button
        type="button"
        aria-label="Back to the walk"
        data-kind="secondary"
        className="btn aspect-square shrink-0 p-0"
        onClick={onWalk}
      >
        <svg viewBox="0 0 20 36" width="20" height="36" aria-hidden>
          <path d="M16 3 3 18 16 33" fill="none" stroke="currentColor" strokeWidth="4.5" />
        </svg>
      </button>
      <div className="min-w-0 flex-1">
        <h1 className="truncate font-mono text-30 font-700 leading-none sm:text-48">{jar.name}</h1>
        <p className="truncate text-17 sm:mt-1 sm:text-18">
          {jar.batch.code}, {jar.batch.formulaName}
          {jar.batch.isReference ? ', a reference' : ''}. {capital(jar.label)}
        </p>
        {jar.standsAs ? <p className="text-17 font-650 sm:text-18">{capital(jar.standsAs)}</p> : null}
      </div>
      <Tray outbox={outbox} />
      {/* On a phone the jar’s code and what waits here come before the light. */}
      <LightSwitch className="max-sm:peer-[.bg-ink]:hidden max-sm:[&>:last-child]:hidden" />
    </header>
  )
}
