'use client'

import Form from 'next/form'
import Link from 'next/link'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import type { FormulaRow, FormulasPage } from '@/lib/formula/queries/list-formulas'
import { formulaList } from '@/lib/formula/rules/list'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import { isNarrowed } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'

type Props = { page: FormulasPage; query: ListQuery; mayWrite: boolean; timeZone: string }

/** The list, and ticked in it the formulas that are compared; the picks go into the address. */
export function FormulaList({ page, query, mayWrite, timeZone }: Props) {
  return (
    <>
      <ListTools
        list={formulaList}
        path="/formulas"
        query={query}
        choices={page.choices}
        searchLabel="Find a formula"
        placeholder="Code, name, type or INCI name"
        total={page.total}
      />
      <Form action="/formulas/compare" className="mt-3">
        <ListLedger
          list={formulaList}
          path="/formulas"
          query={query}
          page={page}
          caption="Formulas"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          before={[tick]}
          cells={cells}
          empty={<NoFormula query={query} mayWrite={mayWrite} />}
        />
        {page.rows.length > 1 ? (
          <div className="mt-3 flex flex-wrap items-center gap-x-4 gap-y-2">
            <Button type="submit">Compare the ticked</Button>
            <p className="text-13 text-soft">
              At most twelve: which prototype stands where, in its studies so far.
            </p>
          </div>
        ) : null}
      </Form>
    </>
  )
}

const tick = {
  key: 'pick',
  title: <span className="sr-only">compare</span>,
  width: '34px',
  cell: (row: FormulaRow) => (
    <input
      type="checkbox"
      name="code"
      value={row.code}
      aria-label={`Compare ${row.code}`}
      className="tick block"
    />
  ),
}

const cells: Parameters<typeof ListLedger<FormulaRow>>[0]['cells'] = {
  code: {
    width: '90px',
    cell: (row) => (
      <Link href={`/formulas/${row.code}`} className="font-650 underline-offset-4 hover:underline">
        {row.code}
      </Link>
    ),
  },
  emulsionType: { from: 'tablet' },
  internal: { cell: (row) => <Inside row={row} /> },
  batches: {
    align: 'right',
    from: 'tablet',
    cell: (row) => (row.batches.length ? row.batches.map((batch) => batch.code).join(', ') : 'none yet'),
  },
  state: { from: 'tablet' },
  missing: { cell: (row) => (row.missingThousandths ? percentText(row.missingThousandths) : 'whole') },
  cost: { cell: (row) => (row.costCentsPerKg === null ? '' : moneyText(row.costCentsPerKg)) },
}

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

function NoFormula({ query, mayWrite }: { query: ListQuery; mayWrite: boolean }) {
  if (isNarrowed(formulaList, query)) {
    return (
      <Empty
        title={query.q ? `No formula has ${query.q}.` : 'No formula is of that kind.'}
        sentence="The search looks in codes, names, emulsion types and INCI names, among what the filters leave."
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
