'use client'

import { useRouter } from 'next/navigation'
import { useEffect, useState } from 'react'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { fileAddress, isAsAlways, listAddress } from '@/lib/list/rules'
import type { Filter, List, ListQuery } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'
import { ColumnsDialog } from './columns-dialog'

type Props<Line> = {
  list: List<Line>
  path: string
  query: ListQuery
  /** What the filters offer that only the rows know, such as clients. */
  choices?: Record<string, string[]>
  /** Filters that stand elsewhere, such as tabs. */
  without?: string[]
  searchLabel: string
  placeholder: string
  /** Rows of all pages; null where they are not counted. */
  total: number | null
  /** The list is drawn, not set in columns: these are then the file's alone. */
  isDrawn?: boolean
}

/** Search, filters, columns and files of a list; all but the files stand in the address, so that a view can be shared. */
export function ListTools<Line>(props: Props<Line>) {
  const { list, path, query, choices = {}, without = [], searchLabel, placeholder, total, isDrawn } = props
  const router = useRouter()
  const [q, setQ] = useState(query.q)
  const [isChoosing, setIsChoosing] = useState(false)
  const [isOpen, setIsOpen] = useState(false)
  const filters = Object.entries<Filter>(list.filters).filter(([key]) => !without.includes(key))
  const set = filters.filter(([key, { fallback }]) => query.filters[key] !== fallback).length
  const go = (change: Parameters<typeof listAddress>[3]) =>
    router.replace(listAddress(path, list, query, { q, ...change }), { scroll: false })
  useEffect(() => {
    if (q.trim() === query.q) return
    const timer = setTimeout(
      () => router.replace(listAddress(path, list, query, { q }), { scroll: false }),
      250,
    )
    return () => clearTimeout(timer)
  }, [q, query, list, path, router])

  return (
    <form
      role="search"
      data-screen-only
      className="flex flex-wrap items-center gap-x-3 gap-y-2"
      onSubmit={(event) => {
        event.preventDefault()
        go({})
      }}
    >
      <Field
        type="search"
        label={searchLabel}
        hideLabel
        placeholder={placeholder}
        value={q}
        onText={setQ}
        wrap="w-full sm:w-[280px]"
      />
      {filters.length === 0 ? null : (
        <>
          {/* A phone shows the list first; its filters come when they are asked for. */}
          <Button className="sm:hidden" aria-expanded={isOpen} onClick={() => setIsOpen(!isOpen)}>
            Filters{set > 0 ? `: ${set}` : ''}
          </Button>
          <div className={`${isOpen ? 'contents' : 'hidden'} sm:contents`}>
            {filters.map(([key, filter]) => (
              <FilterField
                key={key}
                filter={filter}
                value={query.filters[key] ?? ''}
                options={filter.options ?? choices[key] ?? []}
                onPick={(value) => go({ filters: { [key]: value } })}
              />
            ))}
          </div>
        </>
      )}
      <Button onClick={() => setIsChoosing(true)}>
        Columns{isAsAlways(list, query.columns) ? '' : `: ${query.columns.length}`}
      </Button>
      {total === 0 ? null : (
        <p className="ml-auto flex min-h-[var(--hit)] items-center gap-1.5 text-15">
          Export {total === null ? '' : `${grouped(total, 0)} `}as
          <FileLink href={fileAddress(path, list, query, 'csv')} name={list.name} format="CSV" /> or
          <FileLink href={fileAddress(path, list, query, 'xlsx')} name={list.name} format="XLSX" />
        </p>
      )}
      {isChoosing ? (
        <ColumnsDialog
          columns={list.columns}
          chosen={query.columns}
          isDrawn={isDrawn ?? false}
          onClose={() => setIsChoosing(false)}
          onChoose={(columns) => {
            setIsChoosing(false)
            router.replace(listAddress(path, list, query, { columns }), { scroll: false })
          }}
        />
      ) : null}
    </form>
  )
}

type FieldProps = {
  filter: Filter
  value: string
  options: readonly string[]
  onPick: (value: string) => void
}

function FilterField({ filter, value, options, onPick }: FieldProps) {
  if (filter.kind === 'day') return <DayField key={value} label={filter.label} value={value} onDay={onPick} />
  const all = value && !options.includes(value) ? [...options, value] : options
  return (
    <Select
      label={filter.label}
      hideLabel
      value={value}
      empty={`${filter.label}: any`}
      options={all.map((one) => ({ value: one, label: `${filter.label}: ${one}` }))}
      onPick={onPick}
      wrap="min-w-[130px] max-w-full flex-1 sm:w-[170px] sm:flex-none"
    />
  )
}

/** A day counts once it is whole and the field is left; while it is typed the list stays as it is. */
function DayField({ label, value, onDay }: { label: string; value: string; onDay: (day: string) => void }) {
  const [typed, setTyped] = useState(value)
  const set = () => (typed === value ? undefined : onDay(typed))
  return (
    <label className="flex min-h-[var(--hit)] items-center gap-2 text-[length:var(--control-type)] text-soft">
      {label}
      <input
        type="date"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={set}
        onKeyDown={(event) => {
          if (event.key !== 'Enter') return
          event.preventDefault()
          set()
        }}
        className="fld w-[150px]! text-ink"
      />
    </label>
  )
}

function FileLink({ href, name, format }: { href: string; name: string; format: string }) {
  return (
    <a
      href={href}
      download
      aria-label={`Export the ${name} as ${format}`}
      className="inline-flex min-h-[var(--hit)] items-center font-650 underline underline-offset-4"
    >
      {format}
    </a>
  )
}
