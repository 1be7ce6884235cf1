'use client'

import { useEffect } from 'react'
import { Button } from '@/components/ui/button'
import { LinkButton } from '@/components/ui/link-button'

export default function PageFailed({
  error,
  reset,
}: {
  error: Error & { digest?: string }
  reset: () => void
}) {
  useEffect(() => {
    document.title = 'This page could not be made · Stillstand'
  }, [])
  return (
    <main className="px-4 py-10 sm:px-10">
      <h1 className="text-26 leading-tight sm:text-44">
        This page <b>could not be made</b>
      </h1>
      <p className="mt-2 max-w-[64ch] text-17">
        Nothing that was saved is lost. Try it once more; if it stays so, tell the manager
        {error.digest ? (
          <>
            {' '}
            this number: <span className="font-mono">{error.digest}</span>
          </>
        ) : null}
        .
      </p>
      <div className="mt-6 flex gap-2">
        <Button kind="primary" onClick={reset}>
          Try once more
        </Button>
        <LinkButton href="/">To the first page</LinkButton>
      </div>
    </main>
  )
}
