'use client'

import { PageFailed } from '@/components/ui/page-failed'

type Props = { error: Error & { digest?: string }; reset: () => void }

/** Inside the frame, so that one can go elsewhere. */
export default function FailedInNotebook({ error, reset }: Props) {
  return <PageFailed number={error.digest} again={reset} />
}
