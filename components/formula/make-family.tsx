'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { countWord } from '@/components/ui/count-word'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { newId } from '@/lib/db/id'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { formulaKey } from '@/lib/formula/keys'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'

type Props = { base: string; codes: string[] }

/** One batch of each member in its newest version; pressed again after a refusal it goes on where it stopped. */
export function MakeFamily({ base, codes }: Props) {
  const router = useRouter()
  const [isOpen, setIsOpen] = useState(false)
  const [ids] = useState(() => codes.map(() => newId()))
  const [size, setSize] = useState('2000')
  const [sizeG, setSizeG] = useState<number | null>(2000)
  const [made, setMade] = useState(0)
  const [stopped, setStopped] = useState<{ at: string; refusal: ClientError } | null>(null)
  const [isSending, setIsSending] = useState(false)

  async function make() {
    setIsSending(true)
    setStopped(null)
    for (const [index, code] of codes.entries()) {
      try {
        const { versionId } = await fetcher<FormulaPage>(formulaKey(code))
        const body = { id: ids[index], formulaVersionId: versionId, sizeG }
        await send('/api/batches', 'POST', body, { key: ids[index] })
        setMade(index + 1)
      } catch (thrown) {
        setIsSending(false)
        if (!(thrown instanceof ClientError)) throw thrown
        setStopped({ at: code, refusal: thrown })
        return
      }
    }
    router.push(`/batches?${new URLSearchParams({ q: base })}`)
  }

  const sizeError = stopped?.refusal.fields['sizeG']
  return (
    <>
      <button type="button" className="underline underline-offset-4" onClick={() => setIsOpen(true)}>
        A batch of each
      </button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title={`${countWord(codes.length, true)} batches, one of each`}
        sentence={`Of ${codes.join(', ')}, each in its newest version, which this locks.`}
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button kind="primary" busy={isSending} onClick={() => void make()}>
              Make them
            </Button>
          </>
        }
      >
        <NumberField
          label="Size of each"
          unit="g"
          value={size}
          error={sizeError}
          onText={(text, number) => {
            setSize(text)
            setSizeG(number)
          }}
        />
        <p role="status" className="text-15 text-soft">
          {made > 0 ? `${made} of ${codes.length} are made.` : ''}
        </p>
        {stopped && !sizeError ? (
          <>
            <p className="text-15 font-600">It stopped at {stopped.at}.</p>
            <ErrorNote error={stopped.refusal} />
          </>
        ) : null}
      </Dialog>
    </>
  )
}
