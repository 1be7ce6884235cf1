'use client'

import Form from 'next/form'
import Link from 'next/link'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import type { FormulaRow } from '@/lib/formula/queries/list-formulas'
import { percentText } from '@/lib/formula/rules/numbers'
import type { FormulaListQuery } from '@/lib/formula/schema'

type Props = { formulas: FormulaRow[]; query: FormulaListQuery; mayWrite: boolean }

/** The list, and ticked in it the formulas that are compared; the picks go into the address. */
export function FormulaList({ formulas, query, mayWrite }: Props) {
  return (
    <Form action="/formulas/compare">
      <Ledger
        caption="Formulas"
        rows={formulas}
        rowKey={(row) => row.id}
        empty={<NoFormula query={query} mayWrite={mayWrite} />}
        columns={columns.map((column) =>
          column.key === 'pick' ? column : { ...column, sort: sortOf(column.key, query) },
        )}
      />
      {formulas.length > 1 ? (
        <div className="mt-3 flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button type="submit">Compare the ticked</Button>
          <p className="text-13 text-soft">
            At most twelve: which prototype stands where, in its studies so far.
          </p>
        </div>
      ) : null}
    </Form>
  )
}

const columns: LedgerColumn<FormulaRow>[] = [
  {
    key: 'pick',
    title: <span className="sr-only">compare</span>,
    width: '34px',
    cell: (row) => (
      <input
        type="checkbox"
        name="code"
        value={row.code}
        aria-label={`Compare ${row.code}`}
        className="tick block"
      />
    ),
  },
  {
    key: 'code',
    title: 'code',
    width: '90px',
    cell: (row) => (
      <Link href={`/formulas/${row.code}`} className="font-650 underline-offset-4 hover:underline">
        {row.code}
      </Link>
    ),
  },
  { key: 'name', title: 'name', cell: (row) => row.name },
  { key: 'emulsionType', title: 'emulsion type', from: 'tablet', cell: (row) => row.emulsionType },
  {
    key: 'internal',
    title: 'internal, % v/v',
    align: 'right',
    cell: (row) => <Inside row={row} />,
  },
  {
    key: 'batches',
    title: 'batches',
    align: 'right',
    from: 'tablet',
    cell: (row) => (row.batches.length ? row.batches.map((batch) => batch.code).join(', ') : 'none yet'),
  },
  {
    key: 'state',
    title: 'stands at',
    from: 'tablet',
    cell: (row) => `version ${row.versionNumber}, ${row.state}`,
  },
]

/** A level of 0 to 100 %, with the packing of equal balls as its tick. */
function Inside({ row }: { row: FormulaRow }) {
  const percent = row.internalVolumePercent
  if (percent === null) return <span className="text-soft">no lines yet</span>
  const missing = row.missingThousandths
  return (
    <span className="inline-flex items-center justify-end gap-3">
      {missing ? (
        <span className="hidden text-13 text-soft lg:inline">
          {percentText(Math.abs(missing))} % {missing > 0 ? 'missing' : 'too much'}
        </span>
      ) : null}
      <svg viewBox="0 0 100 14" width="100" height="14" aria-hidden className="hidden sm:block">
        <path d="M0 11H100" stroke="var(--rule)" />
        <path d={`M0 11H${percent}`} stroke="var(--ink)" strokeWidth={row.isHighInternalPhase ? 4 : 2} />
        <path d="M74 3V14" stroke="var(--ink)" strokeWidth="1.5" />
      </svg>
      <span className={row.isHighInternalPhase ? 'font-700' : ''}>{percent.toFixed(1)}</span>
    </span>
  )
}

function sortOf(key: string, query: FormulaListQuery) {
  const isNow = query.sort === key
  const order = isNow && query.order === 'asc' ? 'desc' : 'asc'
  const search = new URLSearchParams({ ...(query.q ? { q: query.q } : {}), sort: key, order })
  return {
    href: `/formulas?${search}`,
    now: isNow ? (query.order === 'asc' ? ('up' as const) : ('down' as const)) : undefined,
  }
}

function NoFormula({ query, mayWrite }: { query: FormulaListQuery; mayWrite: boolean }) {
  if (query.q) {
    return (
      <Empty
        title={`No formula has ${query.q}.`}
        sentence="The search looks in codes, names, emulsion types and INCI names."
        act={<LinkButton href="/formulas">Show all formulas</LinkButton>}
      />
    )
  }
  return (
    <Empty
      title="No formula is here yet"
      sentence="A formula says what goes into which phase, and how much of it is inside."
      act={
        mayWrite ? (
          <LinkButton href="/formulas/new" kind="primary">
            Write the first formula
          </LinkButton>
        ) : undefined
      }
    />
  )
}
