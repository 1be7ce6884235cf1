'use client'

import { useId, useState, type KeyboardEvent } from 'react'
import useSWR from 'swr'
import { fetcher } from '@/lib/http/fetcher'
import type { FoundIngredient, IngredientRow } from '@/lib/ingredient/queries'
import { ingredientsKey } from '@/lib/ingredient/keys'
import { Cell } from './cell'

type Props = {
  row: string
  label: string
  value: string
  isKnown: boolean
  error?: string
  onText: (text: string) => void
  onPick: (ingredient: IngredientRow) => void
  onAdd: () => void
}

/** Search as one types, in INCI names, synonyms and suppliers' names; one that is not there yet is added in place. */
export function InciCell({ row, label, value, isKnown, error, onText, onPick, onAdd }: Props) {
  const listId = useId()
  const [isOpen, setIsOpen] = useState(false)
  const [at, setAt] = useState(0)
  const typed = value.trim()
  const isAsking = isOpen && typed.length > 0
  const { data } = useSWR<FoundIngredient[]>(isAsking ? ingredientsKey(typed) : null, fetcher, {
    keepPreviousData: true,
    dedupingInterval: 60_000,
  })
  const found = isAsking ? (data ?? []) : []
  const isThere = found.some((one) => one.inciName.toLowerCase() === typed.toLowerCase())
  const canAdd = isAsking && data !== undefined && !isThere && !isKnown && typed.length > 2
  const count = found.length + (canAdd ? 1 : 0)

  function choose(index: number) {
    const ingredient = found[index]
    setIsOpen(false)
    if (ingredient) onPick(ingredient)
    else if (canAdd) onAdd()
  }

  function press(event: KeyboardEvent) {
    if (!isOpen || count === 0 || event.altKey) return
    if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault()
      event.stopPropagation()
      setAt((now) => (now + (event.key === 'ArrowDown' ? 1 : count - 1)) % count)
    } else if (event.key === 'Enter' && !event.shiftKey) {
      event.preventDefault()
      event.stopPropagation()
      choose(at)
    } else if (event.key === 'Escape') setIsOpen(false)
  }

  return (
    <div className="relative" onKeyDown={press}>
      <Cell
        id={`${row}-inci`}
        data-row={row}
        data-col="inci"
        role="combobox"
        aria-expanded={count > 0 && isOpen}
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={isOpen && count > 0 ? `${listId}-${at}` : undefined}
        label={label}
        value={value}
        error={error}
        placeholder="INCI name"
        title={value.length > 26 ? value : undefined}
        className={value.length > 26 ? 'text-13' : ''}
        onBlur={() => setIsOpen(false)}
        onText={(text) => {
          setIsOpen(true)
          setAt(0)
          onText(text)
        }}
      />
      <ul
        id={listId}
        role="listbox"
        aria-label="Ingredients"
        hidden={!isOpen || count === 0}
        className="floats absolute left-0 top-full z-20 mt-0.5 max-h-80 w-[340px] max-w-[80vw] overflow-y-auto py-1"
      >
        {found.map((one, index) => (
          <Choice key={one.id} id={`${listId}-${index}`} isAt={index === at} onChoose={() => choose(index)}>
            <span className="min-w-0 flex-1">
              {one.inciName}
              {one.match ? (
                <span className="block text-13 text-soft">
                  {one.match.in === 'synonym' ? 'also' : 'supplier’s'} {one.match.text}
                </span>
              ) : null}
            </span>
            <span className="text-13 text-soft">{one.function}</span>
          </Choice>
        ))}
        {canAdd ? (
          <Choice
            id={`${listId}-${found.length}`}
            isAt={at === found.length}
            onChoose={() => choose(found.length)}
          >
            <span>
              Add <b>{typed}</b> to the ingredients
            </span>
          </Choice>
        ) : null}
      </ul>
    </div>
  )
}

type ChoiceProps = { id: string; isAt: boolean; onChoose: () => void; children: React.ReactNode }

function Choice({ id, isAt, onChoose, children }: ChoiceProps) {
  return (
    <li
      id={id}
      role="option"
      aria-selected={isAt}
      // The field keeps the focus; a press counts before the blur closes the list.
      onMouseDown={(event) => {
        event.preventDefault()
        onChoose()
      }}
      className={`flex min-h-9 cursor-pointer items-center gap-3 px-3 py-1 ${isAt ? 'bg-ink text-onink [&_span]:text-onink' : 'hover:bg-recess'}`}
    >
      {children}
    </li>
  )
}
