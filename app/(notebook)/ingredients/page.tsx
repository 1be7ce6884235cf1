import type { Metadata } from 'next'
import { IngredientBook } from '@/components/ingredient/ingredient-book'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listIngredientBook } from '@/lib/ingredient/queries'
import { ingredientList } from '@/lib/ingredient/rules'
import { getLab } from '@/lib/lab/queries'

export const permission = 'formula.read'
export const metadata: Metadata = { title: 'Ingredients' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function IngredientsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = ingredientList.query.parse(await searchParams)
  const [book, lab] = [await listIngredientBook(db, actor, query), await getLab(db)]
  return (
    <IngredientBook
      book={book}
      query={query}
      mayWrite={may(actor, 'formula.write')}
      timeZone={lab.timeZone}
    />
  )
}
