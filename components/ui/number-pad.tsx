'use client'

type Props = {
  onKey: (key: string) => void
  /** Where a value may lie below zero, a key of its own: beside what is under the keys, else in their last row. */
  hasMinus?: boolean
  /** What stands under the keys, such as the button that keeps the entry. */
  children?: React.ReactNode
}

const digits = ['7', '8', '9', '4', '5', '6', '1', '2', '3'] as const
const keys = [...digits, '.', '0', 'back'] as const
const names: Record<string, string> = { back: 'Delete the last digit', '.': 'Decimal point', '-': 'Minus' }

/** Keys for gloves: 64 px high, 12 apart. The field keeps the focus, so that a real keyboard works beside it. */
export function NumberPad({ onKey, hasMinus = false, children }: Props) {
  const isInRow = hasMinus && !children
  return (
    <div>
      <div className="grid grid-cols-12 gap-3" role="group" aria-label="Number pad">
        {(isInRow ? [...digits, '-', ...keys.slice(-3)] : keys).map((key, at) => (
          <button
            key={key}
            type="button"
            aria-label={names[key] ?? key}
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => onKey(key)}
            className={`flex h-16 items-center justify-center rounded border-2 border-rule bg-ground text-36 font-600 leading-none active:bg-recess ${isInRow && at >= digits.length ? 'col-span-3' : 'col-span-4'}`}
          >
            {key === 'back' ? <BackMark /> : key === '-' ? <MinusMark /> : key === '.' ? <Point /> : key}
          </button>
        ))}
      </div>
      {children ? (
        <div className="mt-3 flex gap-3">
          {hasMinus ? (
            <button
              type="button"
              aria-label="Minus"
              onPointerDown={(event) => event.preventDefault()}
              onClick={() => onKey('-')}
              className="flex min-h-16 w-[92px] shrink-0 items-center justify-center rounded border-2 border-rule bg-ground active:bg-recess"
            >
              <MinusMark />
            </button>
          ) : null}
          <div className="min-w-0 flex-1">{children}</div>
        </div>
      ) : null}
    </div>
  )
}

/** What a key does to the text that is being typed. */
export function afterKey(text: string, key: string): string {
  if (key === 'back') return text.slice(0, -1)
  if (key === '-') return text.startsWith('-') ? text.slice(1) : `-${text}`
  if (key === '.') return /[.,]/.test(text) ? text : `${text || '0'}.`
  return text.length >= 12 ? text : text + key
}

function Point() {
  return <span aria-hidden>•</span>
}

function MinusMark() {
  return (
    <svg viewBox="0 0 32 32" width="32" height="32" aria-hidden>
      <path d="M4 16H28" stroke="currentColor" strokeWidth="4" />
    </svg>
  )
}

function BackMark() {
  return (
    <svg viewBox="0 0 48 26" width="48" height="26" aria-hidden>
      <path
        d="M14 2H46V24H14L3 13Z M22 8 32 18 M32 8 22 18"
        fill="none"
        stroke="currentColor"
        strokeWidth="2.5"
        strokeLinejoin="round"
      />
    </svg>
  )
}
