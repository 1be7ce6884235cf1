'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { RadioGroup } from '@/components/ui/radio-group'
import { toast } from '@/components/ui/toast'
import { useSettled } from '@/components/ui/use-settled'
import { newId } from '@/lib/db/id'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulasPage } from '@/lib/formula/queries/list-formulas'
import { typeStep } from '@/lib/formula/rules/typed'
import { formulaKey } from '@/lib/formula/keys'
import { fetcher } from '@/lib/http/fetcher'
import type { ChangeSteps } from './step-sheet'

const mostShown = 7

/** The process of another formula, taken over after the steps that are there, to be edited like one's own. */
export function TakeSteps({ code, onSteps }: { code: string; onSteps: ChangeSteps }) {
  const [isOpen, setIsOpen] = useState(false)
  const [typed, setTyped] = useState('')
  const [picked, setPicked] = useState<string | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const q = useSettled(typed.trim(), 200)
  const { data } = useSWR<FormulasPage>(
    isOpen ? `/api/formulas?${new URLSearchParams({ q })}` : null,
    fetcher,
    { keepPreviousData: true },
  )
  const found = (data?.rows ?? []).filter((one) => one.code !== code)
  const shown = found.slice(0, mostShown)
  const from = shown.some((one) => one.code === picked) ? picked : (shown[0]?.code ?? null)

  async function take() {
    if (!from) return
    setBusy(true)
    setError(null)
    try {
      const { steps } = await fetcher<FormulaPage>(formulaKey(from))
      if (steps.length === 0) {
        setError(`${from} has no steps written. Choose another formula.`)
        return
      }
      onSteps((now) => [...now, ...steps.map((step) => ({ ...typeStep(step), id: newId() }))])
      toast(`${steps.length === 1 ? 'One step' : `${steps.length} steps`} taken from ${from}.`)
      setIsOpen(false)
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <>
      <Button onClick={() => setIsOpen(true)}>Take steps from a formula</Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title="Take the steps of another formula"
        sentence="They come after those that are here, from its newest version, and are then your own to change."
        width={520}
        acts={
          <>
            <Button onClick={() => setIsOpen(false)}>Not now</Button>
            <Button
              kind="primary"
              busy={busy}
              why={from ? undefined : 'No formula is found.'}
              onClick={() => void take()}
            >
              Take its steps
            </Button>
          </>
        }
      >
        <Field
          label="Find a formula"
          value={typed}
          placeholder="Code, name or ingredient"
          onText={setTyped}
        />
        <RadioGroup
          label={data && found.length === 0 ? 'No other formula is called so' : 'Whose steps'}
          layout="ledger"
          value={from}
          onPick={setPicked}
          options={shown.map((one) => ({
            value: one.code,
            label: (
              <>
                <b className="font-650">{one.code}</b> {one.name}
              </>
            ),
          }))}
        />
        {found.length > shown.length ? (
          <p className="text-14 text-soft">More are found. Type on to narrow it down.</p>
        ) : null}
        <ErrorNote error={error} />
      </Dialog>
    </>
  )
}
