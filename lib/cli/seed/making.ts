import { demoFormulas, type DemoFormula } from '@/fixtures/demo/formulas'
import { demoIngredients } from '@/fixtures/demo/ingredients'
import type { DemoClient } from '@/fixtures/demo/people'
import { createBatch } from '@/lib/batch/commands/create-batch'
import { decideBatch } from '@/lib/batch/commands/decide-batch'
import { doStep } from '@/lib/batch/commands/do-step'
import { finishMaking } from '@/lib/batch/commands/finish-making'
import { readBatch } from '@/lib/batch/commands/read-batch'
import { testEmulsionType } from '@/lib/batch/commands/test-type'
import { weighLine } from '@/lib/batch/commands/weigh-line'
import { getBatch } from '@/lib/batch/queries/get-batch'
import {
  batchReadingInput,
  createBatchInput,
  decideInput,
  doStepInput,
  finishMakingInput,
  testTypeInput,
  weighInput,
} from '@/lib/batch/schema'
import { newId } from '@/lib/db/id'
import { createFormula } from '@/lib/formula/commands/create-formula'
import { createFormulaInput } from '@/lib/formula/schema'
import { addIngredients } from '@/lib/ingredient/commands'
import { ingredientInput } from '@/lib/ingredient/schema'
import { daysAgo, type Filling } from './context'

export type Formulas = Record<string, { id: string; versionId: string; name: string; client: DemoClient }>

export async function fillFormulas(filling: Filling, clients: Record<DemoClient, string>): Promise<Formulas> {
  const { liv } = filling.people
  const ids = new Map<string, string>()
  const begun = daysAgo(filling, 798, 10)
  const book = demoIngredients.map(({ entry, isOilPhase }) => {
    const [inciName, fn, density, price, low, high, more] = entry
    const id = newId()
    ids.set(inciName, id)
    const { ph, ...known } = more ?? {}
    return ingredientInput.parse({
      ...{ id, inciName, function: fn, density, isOilPhase, priceCentsPerKg: Math.round(price * 100) },
      ...{ percentLowThousandths: thousandths(low), percentHighThousandths: thousandths(high) },
      ...{ phLow: ph?.[0], phHigh: ph?.[1], ...known },
    })
  })
  await filling.act(liv, begun, (trx) => addIngredients(trx, liv, book))
  const made: Formulas = {}
  for (const formula of demoFormulas) {
    const [id, versionId] = [newId(), newId()]
    await filling.act(liv, begun, (trx) =>
      createFormula(
        trx,
        liv,
        createFormulaInput.parse({
          id,
          versionId,
          code: formula.code,
          name: formula.name,
          emulsionType: formula.emulsionType,
          clientId: clients[formula.client],
          note: formula.note,
          ...{ targetPhLow: formula.targetPh, targetPhHigh: formula.targetPh },
          lines: linesOf(formula, ids),
          steps: formula.steps.map((s) => ({
            id: newId(),
            phase: s.phase,
            instruction: s.instruction,
            speedRpm: s.rpm,
            minutes: s.minutes,
            temperatureC: s.celsius,
            lookFor: s.lookFor ?? '',
            caution: s.caution ?? '',
          })),
        }),
      ),
    )
    made[formula.code] = { id, versionId, name: formula.name, client: formula.client }
  }
  return made
}

function linesOf(formula: DemoFormula, ids: Map<string, string>) {
  const given = formula.lines.reduce((sum, [, , percent]) => sum + Math.round(percent * 1000), 0)
  return formula.lines.map(([phase, inciName, percent, isRemainder]) => {
    const known = demoIngredients.find(({ entry }) => entry[0] === inciName)?.entry
    if (!known) throw new Error(`The demo's formula ${formula.code} names ${inciName}, which its book lacks.`)
    return {
      id: newId(),
      phase,
      ingredientId: ids.get(inciName) ?? null,
      inciName,
      function: known[1],
      percentThousandths: isRemainder ? 100_000 - given : Math.round(percent * 1000),
      density: known[2],
      isInternal: formula.internal.includes(phase),
      isRemainder: isRemainder ?? false,
      priceCentsPerKg: Math.round(known[3] * 100),
    }
  })
}

const thousandths = (percent: number | null) => (percent === null ? null : Math.round(percent * 1000))

const spun = {
  ...{ attribute: 'centrifuge', typed: '0' },
  detail: { rpm: 3000, radiusMm: 100, minutes: 30 },
}
const creamInitial = [
  { attribute: 'look', typed: 'White, glossy, stands in a peak' },
  { attribute: 'ph', typed: '5.50', detail: { path: 'extract', ratio: '1 : 9' } },
  { attribute: 'droplets', typed: '1.6 × 14; 2.2 × 31; 2.8 × 38; 3.4 × 24; 4.1 × 11; 5.0 × 4' },
  spun,
]
const lotionInitial = [
  { attribute: 'look', typed: 'White, smooth, pours' },
  { attribute: 'ph', typed: '5.50', detail: { path: 'direct' } },
  spun,
]

export type Batch = { id: string; code: string; formula: string }

/** A batch made, weighed, stirred, tested and released, as the notebook asks for it. */
export async function makeBatch(
  filling: Filling,
  formulas: Formulas,
  formula: string,
  sizeG: number,
  madeDaysAgo: number,
): Promise<Batch> {
  const { liv } = filling.people
  const id = newId()
  const at = daysAgo(filling, madeDaysAgo, 9)
  const { code } = await filling.act(liv, at, (trx) =>
    createBatch(
      trx,
      liv,
      createBatchInput.parse({ id, formulaVersionId: formulas[formula]!.versionId, sizeG }),
    ),
  )
  const laid = await getBatch(filling.db, liv, code)
  const isOilInWater = laid.emulsionType === 'oil-in-water'
  await filling.act(liv, daysAgo(filling, madeDaysAgo, 13), async (trx) => {
    for (const line of laid.weighings)
      await weighLine(
        trx,
        liv,
        code,
        weighInput.parse({
          id: newId(),
          weighingId: line.id,
          version: line.version,
          actualTyped: Math.max(0.01, line.targetG * (1 + filling.noise.normal() * 0.0008)).toFixed(2),
          lot: `K-${2000 + Math.floor(filling.noise.uniform() * 800)}`,
          balance: 'B1',
          note: line.targetG < 3 ? 'two hundredths of a gram are the balance’s own step' : '',
        }),
      )
    for (const step of laid.steps)
      await doStep(
        trx,
        liv,
        code,
        doStepInput.parse({
          id: newId(),
          stepId: step.id,
          version: step.version,
          actualSpeedRpm: step.speedRpm,
          actualMinutes:
            step.minutes === null
              ? null
              : step.minutes + Math.max(-1, Math.min(1, Math.round(filling.noise.normal()))),
          actualTemperatureC: step.temperatureC,
        }),
      )
    const { version } = await getBatch(trx, liv, code)
    await finishMaking(
      trx,
      liv,
      code,
      finishMakingInput.parse({ version, yieldG: Math.round(sizeG * 0.985), closure: 'screw cap, 1.2 Nm' }),
    )
  })
  await filling.act(liv, daysAgo(filling, madeDaysAgo - 1, 14), async (trx) => {
    const { version } = await getBatch(trx, liv, code)
    await testEmulsionType(
      trx,
      liv,
      code,
      testTypeInput.parse({
        version,
        method: 'conductivity',
        found: laid.emulsionType,
        conductivityUsCm: isOilInWater ? 1200 : 0.4,
      }),
    )
    for (const reading of isOilInWater ? lotionInitial : creamInitial)
      await readBatch(trx, liv, code, batchReadingInput.parse({ id: newId(), moment: 'initial', ...reading }))
  })
  await filling.act(liv, daysAgo(filling, madeDaysAgo - 2, 8), async (trx) => {
    const { version } = await getBatch(trx, liv, code)
    await decideBatch(trx, liv, code, decideInput.parse({ version, decision: 'released' }))
  })
  return { id, code, formula }
}
