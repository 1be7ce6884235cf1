import { ErrorNote } from '@/components/ui/error-note'
import type { ClientError } from '@/lib/http/fetcher'
import { causeText } from './flag-words'

type Detail = { version: number; cause: string | null; action: string | null; why: string | null }

export function isStale(error: ClientError): error is ClientError & { detail: Detail } {
  return (
    error.status === 412 &&
    typeof error.detail === 'object' &&
    error.detail !== null &&
    'version' in error.detail
  )
}

/** Someone was quicker: what they wrote, beside what is still typed here. */
export function Stale({ error }: { error: ClientError & { detail: Detail } }) {
  const { cause, why, action } = error.detail
  return (
    <ErrorNote
      error={error}
      act={
        <dl className="grid grid-cols-[auto_1fr] gap-x-3 text-14 text-ink">
          {[
            ['cause', causeText(cause)],
            ['why', why],
            ['action', action],
          ].map(([name, text]) =>
            text ? (
              <div key={name} className="contents">
                <dt className="text-soft">{name}</dt>
                <dd>{text}</dd>
              </div>
            ) : null,
          )}
        </dl>
      }
    />
  )
}
