'use client'

import { useEffect, useSyncExternalStore } from 'react'

type Toast = {
  id: number
  sentence: string
  /** The second line at the Bench. */
  detail?: string
  density?: 'desk' | 'bench'
  /** One way back, at the Desk only. */
  undo?: { label: string; run: () => void }
  isAlarm?: boolean
}

let toasts: Toast[] = []
let nextToast = 1
const listeners = new Set<() => void>()

function publish(list: Toast[]) {
  toasts = list
  for (const listener of listeners) listener()
}

/** Says what happened: ten seconds at the Desk with one way back, six at the Bench with nothing to press. */
export function toast(sentence: string, options: Omit<Toast, 'id' | 'sentence'> = {}) {
  publish([...toasts.slice(-2), { ...options, id: nextToast++, sentence }])
}

const none: Toast[] = []

function listen(listener: () => void) {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

export function Toasts() {
  const shown = useSyncExternalStore(
    listen,
    () => toasts,
    () => none,
  )
  const isBench = shown.at(-1)?.density === 'bench'
  return (
    <div
      role="status"
      aria-live="polite"
      data-screen-only
      className={`pointer-events-none fixed left-4 z-50 flex max-w-[calc(100vw-32px)] flex-col gap-2 ${
        // At the Bench the thumb's keys are at the foot of the page, and nothing is pressed on what is said.
        isBench ? 'top-3 sm:left-5' : 'bottom-4 sm:left-10'
      }`}
    >
      {shown.map((one) => (
        <ToastLine key={one.id} one={one} />
      ))}
    </div>
  )
}

function ToastLine({ one }: { one: Toast }) {
  const isBench = one.density === 'bench'
  useEffect(() => {
    const timer = setTimeout(() => close(one.id), isBench ? 6_000 : 10_000)
    return () => clearTimeout(timer)
  }, [one.id, isBench])
  return (
    <div
      className={`flex items-center gap-3.5 rounded shadow-float ${one.isAlarm ? 'bg-alarm' : 'bg-ink'} text-onink ${
        isBench
          ? 'min-h-[72px] px-[22px] text-20'
          : 'pointer-events-auto min-h-[44px] min-w-[300px] px-4 py-2 text-15'
      }`}
    >
      {isBench ? <KeptJar /> : null}
      <span className="flex-1">
        <span className={one.detail ? 'font-700' : ''}>{one.sentence}</span>
        {one.detail ? <span className="block text-18">{one.detail}</span> : null}
      </span>
      {one.undo ? (
        <button
          type="button"
          className="min-h-[44px] font-650 underline underline-offset-4 outline-onink"
          onClick={() => {
            one.undo?.run()
            close(one.id)
          }}
        >
          {one.undo.label}
        </button>
      ) : null}
    </div>
  )
}

function KeptJar() {
  return (
    <svg viewBox="0 0 44 46" width="44" height="46" aria-hidden className="shrink-0">
      <path d="M8 12V38H32V12" fill="none" stroke="currentColor" strokeWidth="2.5" />
      <rect x="6" y="5" width="28" height="6" rx="1.5" fill="currentColor" />
      <path d="M0 41H40" stroke="currentColor" strokeWidth="3" />
    </svg>
  )
}

function close(id: number) {
  publish(toasts.filter((one) => one.id !== id))
}
