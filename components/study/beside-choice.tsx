'use client'

import { usePathname, useRouter } from 'next/navigation'
import { Select } from '@/components/ui/select'
import type { CurvesPage } from '@/lib/study/queries/curves'

type Props = { batch: string | null; beside: string; page: CurvesPage }

/** An earlier batch, whose readings are drawn along; which one stands in the address. */
export function BesideChoice({ batch, beside, page }: Props) {
  const router = useRouter()
  const path = usePathname()
  if (page.offers.length === 0) return null
  return (
    <div data-screen-only className="mt-4 flex flex-wrap items-end gap-x-4 gap-y-1">
      <Select
        label="An earlier batch beside it"
        empty="none"
        value={page.beside ? beside : ''}
        options={page.offers.map(({ key, label }) => ({ value: key, label }))}
        onPick={(picked) => {
          const query = new URLSearchParams({
            ...(batch ? { batch } : {}),
            ...(picked ? { beside: picked } : {}),
          })
          router.push(query.size > 0 ? `${path}?${query}` : path, { scroll: false })
        }}
        wrap="w-[min(100%,420px)]"
      />
      {page.beside ? (
        <p className="pb-2 text-14 text-soft">
          {page.beside.name} is drawn in soft lines from its own start, at the stations that both have. No
          trend here uses it.
        </p>
      ) : beside ? (
        <p className="pb-2 text-14">
          {beside} is no batch of a study that you may see. Choose one from the list.
        </p>
      ) : null}
    </div>
  )
}
