import type { ReactNode } from 'react'
import type { Density } from './button'

type Props = {
  id: string
  label: ReactNode
  hint?: ReactNode
  error?: string
  density?: Density
  /** Stands at the right end of the label's line, such as a link or the band. */
  aside?: ReactNode
  hideLabel?: boolean
  className?: string
  children: ReactNode
}

/** Label above, sentence below: the frame of every field. */
export function Labelled({ id, label, hint, error, density, aside, hideLabel, className, children }: Props) {
  return (
    <div data-density={density} className={`flex min-w-0 flex-col gap-1.5 ${className ?? ''}`}>
      <div className={hideLabel && !aside ? 'sr-only' : 'flex items-baseline justify-between gap-3'}>
        <label htmlFor={id} className={hideLabel ? 'sr-only' : 'text-[length:var(--label-type)] font-600'}>
          {label}
        </label>
        {aside}
      </div>
      {children}
      {error ? (
        <p id={`${id}-error`} role="alert" className="text-[length:var(--note-type)] text-alarm">
          {error}
        </p>
      ) : null}
      {hint ? (
        <p id={`${id}-hint`} className="text-[length:var(--note-type)] text-soft">
          {hint}
        </p>
      ) : null}
    </div>
  )
}

/** What a field of that id is described by, for aria-describedby. */
export function describedBy(id: string, hint: unknown, error: unknown): string | undefined {
  const parts = [error ? `${id}-error` : '', hint ? `${id}-hint` : ''].filter(Boolean)
  return parts.length > 0 ? parts.join(' ') : undefined
}
