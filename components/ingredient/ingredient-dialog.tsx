'use client'

import { useState } from 'react'
import { mutate } from 'swr'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { BookRow, IngredientPage } from '@/lib/ingredient/queries'
import { ingredientKey, ingredientsListKey } from '@/lib/ingredient/keys'
import { IngredientFields } from './ingredient-fields'
import { IngredientPast } from './ingredient-past'
import { bodyOf, typeIngredient } from './typed-ingredient'

type Props = {
  ingredient: BookRow | null
  mayWrite: boolean
  timeZone: string
  onClose: () => void
  onDone: () => void
}

/** One entry of the book, to add, to change or, without the right to, to read. */
export function IngredientDialog({ ingredient, mayWrite, timeZone, onClose, onDone }: Props) {
  const [id] = useState(() => ingredient?.id ?? newId())
  const [version, setVersion] = useState(ingredient?.version ?? 1)
  const [typed, setTyped] = useState(() => typeIngredient(ingredient))
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const isStale = error instanceof ClientError && error.status === 412
  const fields = error instanceof ClientError ? error.fields : {}

  async function act(work: () => Promise<void>) {
    setBusy(true)
    setError(null)
    try {
      await work()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  const save = (over = version) =>
    act(async () => {
      const body = bodyOf(typed)
      if (ingredient) await send(ingredientKey(id), 'PUT', { ...body, version: over })
      else await send(ingredientsListKey, 'POST', { ...body, id })
      // Opened again at once, it must not tell of the change before.
      await mutate(ingredientKey(id))
      toast(`${typed.inciName.trim()} is ${ingredient ? 'changed' : 'added'}.`)
      onDone()
      onClose()
    })

  const loadTheirs = () =>
    act(async () => {
      const theirs = await fetcher<IngredientPage>(ingredientKey(id))
      setVersion(theirs.version)
      setTyped(typeIngredient(theirs))
      onDone()
    })

  const saveOver = () => act(async () => save((await fetcher<IngredientPage>(ingredientKey(id))).version))

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={ingredient ? ingredient.inciName : 'A new ingredient'}
      sentence={
        ingredient && mayWrite
          ? 'Lines already written keep what they were written with; the next ones take what stands here.'
          : undefined
      }
      width={720}
      acts={
        mayWrite ? (
          <>
            <Button onClick={onClose}>Leave it</Button>
            <Button kind="primary" busy={busy} onClick={() => void save()}>
              {ingredient ? 'Keep the change' : 'Add it'}
            </Button>
          </>
        ) : (
          <Button onClick={onClose}>Close</Button>
        )
      }
    >
      <IngredientFields
        typed={typed}
        errors={fields}
        readOnly={!mayWrite}
        onChange={(next) => setTyped((now) => ({ ...now, ...next }))}
      />
      {ingredient ? <IngredientPast id={id} timeZone={timeZone} /> : null}
      <ErrorNote
        error={error}
        act={
          isStale ? (
            <div className="flex flex-wrap gap-2">
              <Button onClick={() => void loadTheirs()}>Load theirs, drop mine</Button>
              <Button kind="danger" onClick={() => void saveOver()}>
                Save mine over theirs
              </Button>
            </div>
          ) : undefined
        }
      />
    </Dialog>
  )
}
