import type { ReactNode } from 'react'
import { Tabs, type Tab } from './tabs'

type Props = {
  /** Where one is: code, batch, since when. Links are welcome. */
  crumb?: ReactNode
  /** The finding, with `<b>` where the weight lies. Never the menu's own word. */
  headline: ReactNode
  /** What it means and what waits. */
  sentence?: ReactNode
  tabs?: Tab[]
  tabsLabel?: string
  /** The page's own acts, at the right under the tabs. */
  acts?: ReactNode
}

export function Heading({ crumb, headline, sentence, tabs, tabsLabel = 'Parts of this page', acts }: Props) {
  return (
    <header className="pt-4">
      <div className="flex min-h-7 flex-wrap-reverse items-baseline justify-between gap-x-8 gap-y-1">
        <div className="text-15 text-soft [&_a]:underline [&_a]:underline-offset-4">{crumb}</div>
        {tabs ? <Tabs label={tabsLabel} tabs={tabs} hasLine={false} /> : null}
      </div>
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div className="min-w-0 max-w-[1180px]">
          <h1 className="mt-1 text-balance text-26 leading-[1.15] tracking-[-0.01em] sm:text-36 lg:text-44 [&_b]:font-700">
            {headline}
          </h1>
          {sentence ? <p className="mt-0.5 text-17 leading-[1.35]">{sentence}</p> : null}
        </div>
        {acts ? <div className="flex flex-wrap gap-2 pb-1">{acts}</div> : null}
      </div>
    </header>
  )
}
