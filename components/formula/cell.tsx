'use client'

import type { ComponentProps } from 'react'

type Props = Omit<ComponentProps<'input'>, 'onChange'> & {
  /** Read aloud, because the column's head is too far away. */
  label: string
  value: string
  error?: string
  onText: (text: string) => void
}

/** One field of the sheet: a line of text until it has the focus, then the brightest thing on the page. */
export function Cell({ label, value, error, onText, className, ...rest }: Props) {
  const errorId = error ? `${rest.id}-error` : undefined
  return (
    <div className="min-w-0">
      <input
        autoComplete="off"
        spellCheck={false}
        {...rest}
        aria-label={label}
        aria-invalid={error ? true : undefined}
        aria-describedby={errorId}
        value={value}
        onChange={(event) => onText(event.target.value)}
        className={`h-[31px] w-full min-w-0 rounded border-[1.5px] px-1.5 outline-offset-[-1px] focus:border-ink focus:bg-typed focus:outline-1 focus:outline-ink ${
          error ? 'border-alarm bg-typed' : 'border-transparent bg-transparent hover:border-hair'
        } ${className ?? ''}`}
      />
      {error ? (
        <p id={errorId} role="alert" className="px-1.5 pb-1 text-left text-13 leading-tight text-alarm">
          {error}
        </p>
      ) : null}
    </div>
  )
}
