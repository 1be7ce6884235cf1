import { Tabs } from '@/components/ui/tabs'

/** A study of several batches shows one at a time; which one stands in the address. */
export function BatchTabs({
  code,
  path,
  batches,
  shown,
}: {
  code: string
  path: string
  batches: { code: string; isReference: boolean }[]
  shown: string
}) {
  return (
    <div className="mt-4">
      <Tabs
        label="Batches of this study"
        tabs={batches.map((batch) => ({
          href: `/studies/${encodeURIComponent(code)}${path}?batch=${encodeURIComponent(batch.code)}`,
          label: batch.isReference ? `${batch.code}, a reference` : batch.code,
          isHere: batch.code === shown,
        }))}
      />
    </div>
  )
}
