'use client'

import { useTheme } from './use-theme'

/** Bright and dim, one tap apart: for the Bench's own header. */
export function ThemeButton({ className }: { className?: string }) {
  const { isDark, setTheme } = useTheme()
  return (
    <button
      type="button"
      data-kind="secondary"
      aria-label={isDark ? 'Make the page bright' : 'Make the page dim'}
      onClick={() => setTheme(isDark ? 'light' : 'dark')}
      className={`btn aspect-square p-0 ${className ?? ''}`}
    >
      <svg viewBox="0 0 40 40" width="40" height="40" aria-hidden>
        {isDark ? (
          <g stroke="currentColor" strokeWidth="3" strokeLinecap="round">
            <circle cx="20" cy="20" r="8" fill="currentColor" stroke="none" />
            {[0, 45, 90, 135, 180, 225, 270, 315].map((turn) => (
              <path key={turn} d="M20 3.5V7" transform={`rotate(${turn} 20 20)`} />
            ))}
          </g>
        ) : (
          <path d="M17 4A16.5 16.5 0 1 0 36 23A13.5 13.5 0 0 1 17 4Z" fill="currentColor" />
        )}
      </svg>
    </button>
  )
}
