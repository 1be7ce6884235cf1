'use client'

import { useMemo } from 'react'
import useSWR from 'swr'
import { fetcher } from '@/lib/http/fetcher'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { formulaChecks, type FormulaCheck } from '@/lib/formula/rules/checks'
import type { CheckLine } from '@/lib/formula/rules/checks/check'
import { readDecimal, readScaled } from '@/lib/number/rules'
import { readTargetPh } from '@/lib/formula/rules/target-ph'
import { isBlankLine, remainderOf, type TypedLine } from '@/lib/formula/rules/typed'
import type { EmulsionType, FormulaStep } from '@/lib/formula/schema'
import type { IngredientFacts } from '@/lib/ingredient/queries'
import { ingredientFactsKey } from '@/lib/ingredient/keys'

/** The questions to the draft on screen; what the book knows of an ingredient picked since is fetched. */
export function useChecks(
  { ground }: Pick<FormulaPage, 'ground'>,
  draft: { emulsionType: EmulsionType; targetPh: string; lines: TypedLine[] },
  steps: readonly FormulaStep[],
): FormulaCheck[] {
  const lines = useMemo(() => checkLines(draft.lines), [draft.lines])
  const picked = lines.flatMap(({ ingredientId }) =>
    ingredientId && !ground.facts[ingredientId] ? [ingredientId] : [],
  )
  const unknown = [...new Set(picked)].toSorted()
  const { data } = useSWR<IngredientFacts[]>(unknown.length ? ingredientFactsKey(unknown) : null, fetcher, {
    keepPreviousData: true,
  })
  const known = useMemo(() => {
    const more = Object.fromEntries((data ?? []).map((row) => [row.id, row]))
    return { ...ground, facts: { ...more, ...ground.facts } }
  }, [data, ground])
  return useMemo(() => {
    const read = readTargetPh(draft.targetPh)
    return formulaChecks(draft.emulsionType, lines, steps, known, 'target' in read ? read.target : null)
  }, [draft.emulsionType, draft.targetPh, lines, steps, known])
}

/** As they would be saved; a density that cannot be read is one that is missing. */
function checkLines(typed: readonly TypedLine[]): CheckLine[] {
  const remainder = remainderOf(typed)
  return typed
    .filter((line) => !isBlankLine(line) || line.isRemainder)
    .map((line) => ({
      id: line.id,
      phase: line.phase,
      ingredientId: line.ingredientId,
      inciName: line.inciName.trim(),
      function: line.function.trim(),
      percentThousandths: line.isRemainder ? remainder : (readScaled(line.percent, 3) ?? 0),
      density: readDecimal(line.density),
      isInternal: line.isInternal,
      isRemainder: line.isRemainder,
    }))
}
