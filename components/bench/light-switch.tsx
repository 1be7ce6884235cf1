'use client'

import { useLargeType, useTheme } from '@/components/shell/use-theme'

/** Bright, dim and large type, one tap apart, kept by the device. */
export function LightSwitch({ className = '' }: { className?: string }) {
  const { isDark, setTheme } = useTheme()
  const { isLarge, setLarge } = useLargeType()
  return (
    <div className={`flex shrink-0 gap-3 ${className}`} role="group" aria-label="Light and type">
      <button
        type="button"
        data-kind="secondary"
        aria-label={isDark ? 'Make the page bright' : 'Make the page dim'}
        onClick={() => setTheme(isDark ? 'light' : 'dim')}
        className="btn aspect-square shrink-0 p-0"
      >
        <svg viewBox="0 0 40 40" width="40" height="40" aria-hidden>
          {isDark ? <Sun /> : <Moon />}
        </svg>
      </button>
      <button
        type="button"
        data-kind="secondary"
        aria-label="Large type"
        aria-pressed={isLarge}
        onClick={() => setLarge(!isLarge)}
        className={`btn aspect-square shrink-0 p-0 ${isLarge ? 'shadow-[inset_0_-4px_0_var(--ink)]' : ''}`}
      >
        <span aria-hidden className="flex items-baseline leading-none">
          <span className="text-20">A</span>
          <span className="text-36 font-700">A</span>
        </span>
      </button>
    </div>
  )
}

function Sun() {
  return (
    <g stroke="currentColor" strokeWidth="3" strokeLinecap="round">
      <circle cx="20" cy="20" r="8" fill="currentColor" stroke="none" />
      {[0, 45, 90, 135, 180, 225, 270, 315].map((turn) => (
        <path key={turn} d="M20 3.5V7" transform={`rotate(${turn} 20 20)`} />
      ))}
    </g>
  )
}

function Moon() {
  return <path d="M17 4A16.5 16.5 0 1 0 36 23A13.5 13.5 0 0 1 17 4Z" fill="currentColor" />
}
