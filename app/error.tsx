'use client'

import { PageFailed } from '@/components/ui/page-failed'

export default function Failed({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <main className="px-4 sm:px-10">
      <PageFailed number={error.digest} again={reset} />
    </main>
  )
}
