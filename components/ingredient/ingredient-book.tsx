'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import type { BookRow, IngredientBook as Book } from '@/lib/ingredient/queries'
import { ingredientList } from '@/lib/ingredient/rules'
import { isNarrowed } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'
import { bookCells } from './book-cells'
import { IngredientDialog } from './ingredient-dialog'

type Props = { book: Book; query: ListQuery; mayWrite: boolean; timeZone: string }

/** What the lab weighs in: each with its names, its figures and where these are from. */
export function IngredientBook({ book, query, mayWrite, timeZone }: Props) {
  const router = useRouter()
  const [opened, setOpened] = useState<BookRow | 'new' | null>(null)
  const isFiltered = isNarrowed(ingredientList, query)
  const add = mayWrite ? (
    <Button kind="primary" onClick={() => setOpened('new')}>
      Add an ingredient
    </Button>
  ) : undefined
  return (
    <>
      <Heading
        crumb={query.q ? `Ingredients with ${query.q}` : 'Ingredients'}
        headline={<Headline book={book} />}
        sentence={
          book.counts.fromMemory > 0
            ? 'Each density decides the share by volume; one that was measured or read off a data sheet is set bold.'
            : undefined
        }
        acts={book.counts.all > 0 || isFiltered ? add : undefined}
      />
      <div className="mt-5">
        <ListTools
          list={ingredientList}
          path="/ingredients"
          query={query}
          choices={book.choices}
          searchLabel="Find an ingredient"
          placeholder="INCI name, synonym, supplier’s name"
          total={book.total}
        />
      </div>
      <div className="mt-3">
        <ListLedger
          list={ingredientList}
          path="/ingredients"
          query={query}
          page={book}
          caption="Ingredients"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          cells={bookCells(setOpened)}
          empty={
            isFiltered ? (
              <Empty
                title={query.q ? `No ingredient has ${query.q}.` : 'No ingredient is of that kind.'}
                sentence="The search looks in INCI names, synonyms and suppliers’ names."
                act={<LinkButton href="/ingredients">Show the whole book</LinkButton>}
              />
            ) : (
              <Empty
                title="What the lab weighs in"
                sentence="Each ingredient with its names, density, price and usual share. A formula adds those it meets for the first time."
                act={add}
              />
            )
          }
        />
      </div>
      {opened ? (
        <IngredientDialog
          ingredient={opened === 'new' ? null : opened}
          mayWrite={mayWrite}
          timeZone={timeZone}
          onClose={() => setOpened(null)}
          onDone={() => router.refresh()}
        />
      ) : null}
    </>
  )
}

function Headline({ book }: { book: Book }) {
  if (book.counts.all === 0) return <>Nothing to weigh in here</>
  if (book.counts.fromMemory === 0)
    return (
      <>
        <b>Every density</b> has its source
      </>
    )
  return (
    <>
      <b>
        {grouped(book.counts.fromMemory, 0)} of {grouped(book.counts.all, 0)}
      </b>{' '}
      {book.counts.all === 1 ? 'density is' : 'densities are'} from memory
    </>
  )
}
