/** What a refusal leaves on the trail although its transaction is undone. */
export type RefusedEvent = {
  event: string
  table?: string
  id?: string
  detail?: Record<string, unknown>
}

export class AppError extends Error {
  readonly status: number
  readonly code: string
  readonly sentence: string
  readonly fields?: Record<string, string>
  readonly detail?: unknown
  retryAfterSeconds?: number
  trailEvent?: RefusedEvent

  constructor(
    status: number,
    code: string,
    sentence: string,
    more: { fields?: Record<string, string> | undefined; detail?: unknown; cause?: unknown } = {},
  ) {
    super(sentence, more.cause === undefined ? undefined : { cause: more.cause })
    this.status = status
    this.code = code
    this.sentence = sentence
    if (more.fields) this.fields = more.fields
    if (more.detail !== undefined) this.detail = more.detail
  }

  /** `throw refuse.forbidden('…').onTrail({ event: 'signature refused', table: 'shelf_case', id })` */
  onTrail(event: RefusedEvent): this {
    this.trailEvent = event
    return this
  }
}

export type ErrorBody = {
  error: {
    status: number
    code: string
    sentence: string
    fields?: Record<string, string>
    detail?: unknown
    incident?: string
  }
}

/** Every refusal is a sentence: what happened, to which thing, what to do. */
export const refuse = {
  unreadable: (sentence: string) => new AppError(400, 'unreadable', sentence),
  signIn: (sentence = 'You are not signed in. Sign in to go on.') => new AppError(401, 'sign-in', sentence),
  forbidden: (sentence: string) => new AppError(403, 'forbidden', sentence),
  notFound: (sentence = 'There is nothing at this address, or it is not shared with you.') =>
    new AppError(404, 'not-found', sentence),
  conflict: (sentence: string, detail?: unknown) => new AppError(409, 'conflict', sentence, { detail }),
  stale: (sentence: string, detail?: unknown) => new AppError(412, 'stale', sentence, { detail }),
  tooLarge: (sentence: string) => new AppError(413, 'too-large', sentence),
  unsupported: (sentence: string) => new AppError(415, 'unsupported', sentence),
  invalid: (sentence: string, fields?: Record<string, string>) =>
    new AppError(422, 'invalid', sentence, { fields }),
  slowDown: (sentence: string, retryAfterSeconds: number) => {
    const error = new AppError(429, 'slow-down', sentence)
    error.retryAfterSeconds = Math.max(1, Math.ceil(retryAfterSeconds))
    return error
  },
  unavailable: (sentence: string, cause?: unknown) => new AppError(503, 'unavailable', sentence, { cause }),
}
