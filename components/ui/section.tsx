import type { ReactNode } from 'react'

type Props = {
  title: ReactNode
  sentence?: ReactNode
  aside?: ReactNode
  children: ReactNode
  className?: string
}

/** A part of a page: its title stands on an ink line. */
export function Section({ title, sentence, aside, children, className }: Props) {
  return (
    <section className={`min-w-0 ${className ?? ''}`}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b-[1.75px] border-ink pb-1.5">
        <h2 className="text-20 font-650">{title}</h2>
        {aside ? <div className="text-15">{aside}</div> : null}
        {sentence ? <p className="w-full text-15 text-soft">{sentence}</p> : null}
      </div>
      <div className="pt-3">{children}</div>
    </section>
  )
}
