'use client'

import { LabelSheet, type Label } from '@/components/jar/label-sheet'
import { Button } from '@/components/ui/button'
import { Heading } from '@/components/ui/heading'
import Link from 'next/link'

/** The label sheet as it is printed; on screen with what must be known before. */
export function StudyLabels({ code, labels }: { code: string; labels: Label[] }) {
  return (
    <>
      <div data-screen-only>
        <Heading
          crumb={
            <>
              <Link href={`/studies/${encodeURIComponent(code)}/jars`}>Jars of {code}</Link>
            </>
          }
          headline={
            <>
              <b>{labels.length}</b> {labels.length === 1 ? 'label' : 'labels'}, three by seven on a sheet of
              A4
            </>
          }
          sentence="Print at 100 %, without margins added by the printer. The square holds the jar's code alone."
          acts={
            <Button kind="primary" onClick={() => window.print()}>
              Print
            </Button>
          }
        />
      </div>
      <LabelSheet labels={labels} />
    </>
  )
}
