'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import type { BookRow, IngredientBook as Book } from '@/lib/ingredient/queries'
import { ingredientPageSize, type IngredientBookQuery } from '@/lib/ingredient/schema'
import { grouped } from '@/lib/number/rules'
import { bookAddress } from './book-address'
import { bookColumns } from './book-columns'
import { BookFilter } from './book-filter'
import { IngredientDialog } from './ingredient-dialog'

type Props = { book: Book; query: IngredientBookQuery; mayWrite: boolean; timeZone: string }

/** What the lab weighs in: each with its names, its figures and where these are from. */
export function IngredientBook({ book, query, mayWrite, timeZone }: Props) {
  const router = useRouter()
  const [opened, setOpened] = useState<BookRow | 'new' | null>(null)
  const isFiltered = Boolean(query.q.trim()) || query.phase !== 'any' || query.function !== ''
  const add = mayWrite ? (
    <Button kind="primary" onClick={() => setOpened('new')}>
      Add an ingredient
    </Button>
  ) : undefined
  return (
    <>
      <Heading
        crumb={query.q.trim() ? `Ingredients with ${query.q.trim()}` : 'Ingredients'}
        headline={<Headline book={book} />}
        sentence={
          book.fromMemory > 0
            ? 'Each density decides the share by volume; one that was measured or read off a data sheet is set bold.'
            : undefined
        }
        acts={book.count > 0 || isFiltered ? add : undefined}
      />
      <div className="mt-6">
        <BookFilter query={query} functions={book.functions} />
      </div>
      <div className="mt-3">
        <Ledger
          caption="Ingredients"
          rows={book.rows}
          rowKey={(row) => row.id}
          columns={bookColumns(query, setOpened)}
          empty={
            isFiltered ? (
              <Empty
                title={
                  query.q.trim() ? `No ingredient has ${query.q.trim()}.` : 'No ingredient is of that kind.'
                }
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
      <Pages book={book} query={query} />
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
  if (book.count === 0) return <>Nothing to weigh in here</>
  if (book.fromMemory === 0)
    return (
      <>
        <b>Every density</b> has its source
      </>
    )
  return (
    <>
      <b>
        {grouped(book.fromMemory, 0)} of {grouped(book.count, 0)}
      </b>{' '}
      {book.count === 1 ? 'density is' : 'densities are'} from memory
    </>
  )
}

function Pages({ book, query }: { book: Book; query: IngredientBookQuery }) {
  if (book.pages < 2) return null
  const first = (book.page - 1) * ingredientPageSize + 1
  const link = 'inline-flex min-h-11 items-center underline underline-offset-4'
  return (
    <nav
      aria-label="Pages of the book"
      data-screen-only
      className="mt-3 flex flex-wrap items-center gap-x-8 text-15"
    >
      <span className="text-soft">
        {first} to {first + book.rows.length - 1} of {grouped(book.count, 0)}
      </span>
      {book.page > 1 ? (
        <Link href={bookAddress(query, { page: book.page - 1 })} className={link}>
          Page {book.page - 1}
        </Link>
      ) : null}
      {book.page < book.pages ? (
        <Link href={bookAddress(query, { page: book.page + 1 })} className={link}>
          Page {book.page + 1}
        </Link>
      ) : null}
    </nav>
  )
}
