import { AppError, refuse } from './errors'

const unreachable = new Set(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', 'EPIPE', 'ETIMEDOUT'])

/** PostgreSQL's own refusals as sentences; null where it is a fault of ours. */
export function fromDatabaseError(error: unknown): AppError | null {
  if (!(error instanceof Error)) return null
  const { code, constraint, column } = error as Error & {
    code?: string
    constraint?: string
    column?: string
  }
  const named = (constraint ?? column ?? '').replaceAll('_', ' ')
  if (isUnreachable(code, error.message))
    return refuse.unavailable(
      'The database does not answer just now. Nothing was saved; try again in a moment.',
      error,
    )
  switch (code) {
    case '23505':
      return new AppError(
        409,
        'conflict',
        `This is already there (${named}). Open it instead of making it again.`,
      )
    case '23503':
      return new AppError(
        422,
        'invalid',
        `Something this refers to is not there (${named}). Reload and choose again.`,
      )
    case '23502':
    case '23514':
      return new AppError(
        422,
        'invalid',
        `A value is missing or not allowed (${named}). Correct it and save again.`,
      )
    case '22P02':
    case '22003':
    case '22007':
    case '22008':
    case '22009':
    case '22021':
    case '22P05':
      return new AppError(
        422,
        'invalid',
        'A value cannot be read as what it should be. Correct it and save again.',
      )
    case '42501':
      return refuse.conflict('This record is kept as it is and cannot be changed. Add a correction instead.')
    case '40001':
    case '40P01':
    case '55P03':
      return refuse.unavailable('Someone else is saving the same thing. Nothing was saved; try again.', error)
    default:
      return null
  }
}

function isUnreachable(code: string | undefined, message: string): boolean {
  if (code && (unreachable.has(code) || code.startsWith('08') || code.startsWith('57P') || code === '53300'))
    return true
  return /timeout exceeded when trying to connect|Connection terminated/.test(message)
}
