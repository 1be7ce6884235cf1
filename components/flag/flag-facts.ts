import type { FlagPage } from '@/lib/flag/queries/one'
import { instrumentDayMethod, ruleMethods } from '@/lib/science/methods/drift'
import { exactly, factsOf, type FigureFacts, type Values } from '@/lib/science/methods/method'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

/** The rule that raised a flag with its thresholds, and every number that it carries from that day. */
export function flagFacts(flag: FlagPage): FigureFacts {
  const method =
    flag.rule === 'common shift'
      ? instrumentDayMethod
      : flag.rule in ruleMethods
        ? ruleMethods[flag.rule as keyof typeof ruleMethods]
        : ruleMethods.conditions
  return factsOf(method, {
    result: `${method.name}, flag ${flag.number}`,
    when: `Found and kept on ${spokenDay(dayIn(flag.zone, flag.raisedAt))}.`,
    values: { reason: flag.sentence, ...evidenceValues(flag) },
  })
}

/** What is in the attribute's own unit. */
const measured = new Set([
  'mean',
  'edge',
  'by',
  'repeat',
  'difference',
  'allowed',
  'expected',
  'initial',
  'range',
])
/** Shares of the band, said in percent. */
const shares = new Set(['used', 'usedNow', 'usedAtEnd'])

function evidenceValues(flag: FlagPage): Values {
  const { unit } = flag
  return Object.fromEntries(
    Object.entries(flag.evidence).map(([key, value]): [string, string | number | null] => {
      if (key === 'residuals') return [key, residualsText(value)]
      if (typeof value !== 'number') return [key, typeof value === 'string' ? value : null]
      if (measured.has(key)) return [key, exactly(value, unit)]
      if (shares.has(key)) return [key, exactly(100 * value, '%')]
      if (key === 'slope') return [key, exactly(value, `${unit} a week`.trim())]
      return [key, value]
    }),
  )
}

function residualsText(value: unknown): string | null {
  if (!Array.isArray(value)) return null
  return value
    .map((one: { name?: unknown; residual?: unknown }) =>
      typeof one.residual === 'number' ? `${String(one.name)}: ${exactly(one.residual)}` : '',
    )
    .filter(Boolean)
    .join('; ')
}
