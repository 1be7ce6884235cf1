import type { FlagPage } from '@/lib/flag/queries/one'
import { namedJar } from '@/lib/jar/rules/code'
import { flagKeys } from '@/lib/flag/keys'
import type { FlagCause } from '@/lib/flag/schema'

/** What becomes of it: an answer, or the doubt or the reading itself set aside. */
export type Settling = 'answer' | 'doubt' | 'reading'

export type AnswerState = {
  settling: Settling
  cause: FlagCause | null
  why: string
  picked: string[]
  other: string
}

export const emptyAnswer: AnswerState = { settling: 'answer', cause: null, why: '', picked: [], other: '' }

/** A reading is set aside for what went wrong in the laboratory only. */
export const laboratoryCauses: FlagCause[] = ['measurement', 'instrument', 'station']

/** What this person may do with it; one choice alone is not asked for. */
export function settlings(flag: FlagPage, isQuality: boolean): Settling[] {
  return [
    'answer',
    ...(flag.level === 'doubt' ? (['doubt'] as const) : []),
    ...(isQuality && (flag.readingId !== null || flag.onDay !== null) ? (['reading'] as const) : []),
  ]
}

/** Acts that one would have to type again and again; each is a sentence of the answer. */
export function usualActs(flag: FlagPage): { text: string; hint?: string }[] {
  const [spare] = flag.spares
  const where =
    flag.studyStationId === null ? '' : flag.isFreezeThaw ? ' in freeze-thaw' : ` at ${flag.temperatureC} °C`
  return [
    ...(spare
      ? [
          {
            text: `Repeat on spare jar ${namedJar(spare.code, { temperatureC: flag.temperatureC, isFreezeThaw: flag.isFreezeThaw ?? false })}`,
            hint: `shelf ${spare.shelf}, place ${spare.place}; ${flag.spares.length === 1 ? 'the last one' : `${flag.spares.length} left`} there`,
          },
        ]
      : []),
    { text: 'Keep reading as planned' },
    ...(where ? [{ text: `End the study${where.replace('-', '−')}` }] : []),
  ]
}

export function actionText({ picked, other }: AnswerState): string {
  return [...picked, other.trim()].filter(Boolean).join('. ')
}

/** Where it goes and what is sent. */
export function answerRequest(
  flag: FlagPage,
  state: AnswerState,
  version: number,
): { url: string; body: object } {
  const { settling, cause, why } = state
  return settling === 'answer'
    ? { url: flagKeys.answer(flag.number), body: { version, cause, why, action: actionText(state) } }
    : { url: flagKeys.setAside(flag.number), body: { version, settles: settling, cause, why } }
}
