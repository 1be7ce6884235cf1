'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'

type Props = {
  formula: { code: string; number: number; versionId: string; state: string }
  /** Why no batch can be made now. */
  why?: string
}

export function MakeBatch({ formula, why }: Props) {
  const router = useRouter()
  const [isOpen, setIsOpen] = useState(false)
  const [id] = useState(newId)
  const [size, setSize] = useState('2000')
  const [sizeG, setSizeG] = useState<number | null>(2000)
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)

  async function make() {
    setIsSending(true)
    setRefusal(null)
    try {
      const body = { id, formulaVersionId: formula.versionId, sizeG }
      const batch = await send<{ code: string }>('/api/batches', 'POST', body, { key: id })
      router.push(`/batches/${batch.code}`)
    } catch (thrown) {
      setIsSending(false)
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    }
  }

  return (
    <>
      <Button why={why} onClick={() => setIsOpen(true)}>
        Make a batch
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title={`A batch of ${formula.code}, version ${formula.number}`}
        sentence={
          formula.state === 'draft'
            ? 'This locks the version. What changes later goes into a new one.'
            : 'The weighing sheet is scaled from this version.'
        }
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={isSending} onClick={() => void make()}>
              Make the batch
            </Button>
          </>
        }
      >
        <NumberField
          label="Size"
          unit="g"
          value={size}
          error={refusal?.fields['sizeG']}
          onText={(text, number) => {
            setSize(text)
            setSizeG(number)
          }}
          hint="About 50 g a jar; a 12-week screen takes some 40 jars."
        />
        <ErrorNote error={refusal && !refusal.fields['sizeG'] ? refusal : null} />
      </Dialog>
    </>
  )
}
