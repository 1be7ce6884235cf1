'use client'

import { Button } from './button'
import { LinkButton } from './link-button'

export function PageFailed({ number, again }: { number?: string; again: () => void }) {
  return (
    <div className="pt-10">
      <title>This page could not be made · Stillstand</title>
      <h1 className="text-26 leading-tight sm:text-44">
        This page <b>could not be made</b>
      </h1>
      <p className="mt-2 max-w-[64ch] text-17">
        Nothing that was saved is lost. Try it once more
        {number ? (
          <>
            ; if it stays so, tell the manager this number: <span className="font-mono">{number}</span>
          </>
        ) : (
          '; if it stays so, tell the manager'
        )}
        .
      </p>
      <div className="mt-6 flex gap-2">
        <Button kind="primary" onClick={again}>
          Try once more
        </Button>
        <LinkButton href="/">To the first page</LinkButton>
      </div>
    </div>
  )
}
