'use client'

import useSWR from 'swr'
import { Button } from '@/components/ui/button'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { initialForStudy } from '@/lib/batch/rules/readings'
import { batchKey } from '@/lib/batch/keys'
import { fetcher } from '@/lib/http/fetcher'

type Taken = NonNullable<ReturnType<typeof initialForStudy>>
type Props = {
  batchCode: string
  asked: Parameters<typeof initialForStudy>[1]
  onTake: (taken: Taken) => void
}

/** What was read of the batch after its rest, offered as the study's initial; nothing where it was not read so. */
export function TakeInitial({ batchCode, asked, onTake }: Props) {
  const { data } = useSWR<BatchPage>(batchKey(batchCode), fetcher)
  const offered = data ? initialForStudy(data.readings, asked) : null
  if (!offered) return null
  return (
    <Button kind="link" onClick={() => onTake(offered)}>
      Take {offered.texts.join(', ')} from the batch
      <span className="sr-only"> {batchCode}</span>
    </Button>
  )
}
