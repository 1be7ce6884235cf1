type Props = { short: readonly string[]; children: string }

/** In what a half falls short as it is typed, and what that means. */
export function ShortNote({ short, children }: Props) {
  return (
    <div aria-live="polite">
      {short.length > 0 ? (
        <div className="border-l-4 border-alarm py-1 pl-3 text-18">
          <p className="font-650 text-alarm">{short.join(' ')}</p>
          <p>{children}</p>
        </div>
      ) : null}
    </div>
  )
}
