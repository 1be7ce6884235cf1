import type { ReactNode } from 'react'

/** A band of ink across the page for what is true of all of it. */
export function Band({ children, aside }: { children: ReactNode; aside?: ReactNode }) {
  return (
    <div className="flex min-h-[42px] items-center justify-between gap-6 bg-ink px-4 py-1.5 text-15 text-onink sm:px-10">
      <p>{children}</p>
      {aside ? <p className="hidden sm:block">{aside}</p> : null}
    </div>
  )
}
