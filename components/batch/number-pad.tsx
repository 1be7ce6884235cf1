'use client'

type Props = { value: string; onText: (text: string) => void; label: string }

/** Keys of 92 by 64 by the thumb. They type into the field; the device's own keyboard stays away. */
export function NumberPad({ value, onText, label }: Props) {
  const press = (key: string) => {
    if (key === 'back') onText(value.slice(0, -1))
    else if (key !== '.' || !/[.,]/.test(value)) onText(value + key)
  }
  return (
    <div role="group" aria-label={label} className="grid grid-cols-3 gap-3">
      {['7', '8', '9', '4', '5', '6', '1', '2', '3', '.', '0', 'back'].map((key) => (
        <button
          key={key}
          type="button"
          aria-label={key === 'back' ? 'Delete the last digit' : key === '.' ? 'Decimal point' : key}
          onClick={() => press(key)}
          className="grid h-16 min-w-16 place-items-center rounded border-2 border-rule bg-ground text-36 font-600 active:bg-ink active:text-onink"
        >
          {key === 'back' ? (
            <svg viewBox="0 0 44 24" width="44" height="24" aria-hidden>
              <path
                d="M2 12L12 2H42V22H12ZM22 7.5L31 16.5M31 7.5L22 16.5"
                fill="none"
                stroke="currentColor"
                strokeWidth="2.5"
              />
            </svg>
          ) : (
            key
          )}
        </button>
      ))}
    </div>
  )
}
