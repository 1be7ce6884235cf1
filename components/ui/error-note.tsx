import type { ReactNode } from 'react'

type Told = { sentence: string; incident?: string }

/** A refusal in a sentence, on an alarm line, with one thing to press. Takes a ClientError or any thrown value. */
export function ErrorNote({ error, act }: { error: unknown; act?: ReactNode }) {
  if (!error) return null
  const told = sentenceOf(error)
  return (
    <div role="alert" className="border-l-4 border-alarm py-1 pl-3">
      <p className="font-600 text-alarm">{told.sentence}</p>
      {told.incident ? (
        <p className="text-13 text-soft">
          For the manager: incident <span className="font-mono">{told.incident}</span>
        </p>
      ) : null}
      {act ? <div className="mt-2">{act}</div> : null}
    </div>
  )
}

export function sentenceOf(error: unknown): Told {
  if (typeof error === 'string') return { sentence: error }
  if (
    typeof error === 'object' &&
    error !== null &&
    'sentence' in error &&
    typeof error.sentence === 'string'
  ) {
    const incident = 'incident' in error && typeof error.incident === 'string' ? error.incident : undefined
    return { sentence: error.sentence, incident }
  }
  return { sentence: 'The server did not answer. What you typed is still here; try again in a moment.' }
}
