import { config } from 'zod'

// Imported as a whole (`import * as z`), so that a page gets only what it uses of it: the object that zod exports as `z`
// holds all of zod, languages included, four times as much.

// Without jitless zod probes `eval`, which the content security policy refuses and reports.
// A schema's own message wins over these; they keep the rest to plain sentences.
config({ jitless: true, customError: (issue) => sentenceFor(issue) })

export * from 'zod'

function sentenceFor(issue: {
  code?: string | undefined
  input?: unknown
  [key: string]: unknown
}): string | undefined {
  const { code, input, minimum, maximum, origin } = issue
  if (code === 'invalid_type' && (input === undefined || input === null)) return 'Fill this in.'
  if (code === 'invalid_type' && issue['expected'] === 'int') return 'Type a whole number.'
  if (code === 'invalid_type' && issue['expected'] === 'number') return 'Type a number here.'
  if (code === 'invalid_type') return 'This cannot be read here. Type it again.'
  if (origin === 'int' && (code === 'too_small' || code === 'too_big'))
    return code === 'too_small'
      ? 'That is too small for a number here.'
      : 'That is too large for a number here.'
  if (code === 'too_small') {
    if (origin === 'string')
      return Number(minimum) <= 1 ? 'Fill this in.' : `Use at least ${minimum} characters.`
    if (origin === 'array') return Number(minimum) <= 1 ? 'Add at least one.' : `Add at least ${minimum}.`
    return issue['inclusive'] === false ? `Use more than ${minimum}.` : `Use ${minimum} or more.`
  }
  if (code === 'too_big') {
    if (origin === 'string') return `Use at most ${maximum} characters.`
    if (origin === 'array') return `Use at most ${maximum}.`
    return issue['inclusive'] === false ? `Use less than ${maximum}.` : `Use at most ${maximum}.`
  }
  if (code === 'invalid_value') return 'Choose one of the values offered.'
  if (code === 'invalid_format' && issue['format'] === 'email')
    return 'Type an e-mail address, such as name@lab.example.'
  if (code === 'invalid_format') return 'This is not in the form it should have. Type it again.'
  if (code === 'unrecognized_keys') return 'There is something here that is not known.'
  return undefined
}
