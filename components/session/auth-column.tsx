import type { ReactNode } from 'react'

/** One thing to do, in one column under the name: invitation, new password, first start. */
export function AuthColumn({
  title,
  sentence,
  children,
}: {
  title: ReactNode
  sentence?: ReactNode
  children: ReactNode
}) {
  return (
    <main className="w-full flex-1 max-w-[520px] px-4 py-8 sm:px-10 sm:py-12">
      <h1 className="text-26 leading-tight sm:text-30 [&_b]:font-700">{title}</h1>
      {sentence ? <p className="mt-2 text-17">{sentence}</p> : null}
      <div className="mt-6">{children}</div>
    </main>
  )
}
