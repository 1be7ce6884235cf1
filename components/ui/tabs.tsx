import Link from 'next/link'

export type Tab = { href: string; label: string; isHere: boolean; count?: number }

/** Links that stand on the line they switch. */
export function Tabs({ label, tabs, hasLine = true }: { label: string; tabs: Tab[]; hasLine?: boolean }) {
  return (
    <nav
      aria-label={label}
      data-screen-only
      className={`-mx-4 flex gap-x-[22px] overflow-x-auto px-4 text-16 sm:mx-0 sm:px-0 ${hasLine ? 'border-b border-ink' : ''}`}
    >
      {tabs.map((tab) => (
        <Link
          key={tab.href}
          href={tab.href}
          aria-current={tab.isHere ? 'page' : undefined}
          className={`relative inline-flex min-h-[44px] shrink-0 items-end pb-[9px] sm:min-h-[34px] ${
            tab.isHere
              ? 'font-750 after:absolute after:-inset-x-px after:bottom-0 after:h-1 after:bg-ink'
              : 'hover:underline hover:underline-offset-4'
          }`}
        >
          {tab.label}
          {tab.count === undefined ? null : <span className="ml-1.5 text-soft">{tab.count}</span>}
        </Link>
      ))}
    </nav>
  )
}
