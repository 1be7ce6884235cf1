'use client'

import { useId, type ComponentProps, type MouseEvent } from 'react'
import { Busy } from './busy'

export type ButtonKind = 'primary' | 'secondary' | 'danger' | 'danger-asked' | 'link'
export type Density = 'desk' | 'bench'

type Props = Omit<ComponentProps<'button'>, 'disabled'> & {
  kind?: ButtonKind
  density?: Density
  /** Why the act is off. The button is then dotted, keeps the focus, and the reason stands with it. */
  why?: string
  busy?: boolean
}

export function Button({
  kind = 'secondary',
  density,
  why,
  busy,
  onClick,
  children,
  className,
  ...rest
}: Props) {
  const reasonId = useId()
  const isOff = Boolean(why) || Boolean(busy)

  function press(event: MouseEvent<HTMLButtonElement>) {
    // An aria-disabled button still submits its form unless it is stopped.
    if (isOff) event.preventDefault()
    else onClick?.(event)
  }

  const button = (
    <button
      type="button"
      {...rest}
      data-kind={kind}
      data-density={density}
      aria-disabled={why ? true : undefined}
      aria-busy={busy || undefined}
      aria-describedby={why ? reasonId : rest['aria-describedby']}
      onClick={press}
      className={`btn ${className ?? ''}`}
    >
      {busy ? <Busy /> : null}
      {children}
    </button>
  )
  if (!why) return button
  return (
    <span className="inline-flex flex-col gap-1.5">
      {button}
      <span id={reasonId} className="text-[length:var(--note-type)] text-soft">
        {why}
      </span>
    </span>
  )
}
