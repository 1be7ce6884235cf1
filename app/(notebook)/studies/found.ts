import { notFound } from 'next/navigation'
import { AppError } from '@/lib/http/errors'

/** What is not there, or not shared with this person, is Next's own not-found page. */
export async function found<T>(query: Promise<T>): Promise<T> {
  return query.catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
}
