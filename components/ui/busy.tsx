/** Three jars that fill one after the other, as wide as two letters. */
export function Busy({ label }: { label?: string }) {
  return (
    <svg
      viewBox="0 0 30 14"
      width="30"
      height="14"
      className="shrink-0"
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      {[0, 1, 2].map((place) => (
        <g key={place} transform={`translate(${place * 10} 0)`}>
          <rect
            x="2"
            y="5"
            width="5"
            height="7"
            fill="currentColor"
            className="animate-pulse"
            style={{ animationDelay: `${place * 0.3}s` }}
          />
          <path d="M1.5 4V12.5H7.5V4M0.5 2.5H8.5" fill="none" stroke="currentColor" strokeWidth="1.25" />
        </g>
      ))}
    </svg>
  )
}
