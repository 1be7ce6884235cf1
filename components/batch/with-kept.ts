import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { currentPortions, gramsIn, readWeight } from '@/lib/batch/rules/weighing'
import { doStepInput, fillJarInput, batchReadingInput, weighInput } from '@/lib/batch/schema'
import type { OutboxItem } from '@/components/device/outbox-item'

/** The batch as it will be once what this tablet keeps has gone out: shown at once, versions counted on. */
export function withKept(batch: BatchPage, kept: readonly OutboxItem[]): BatchPage {
  return kept.filter((item) => item.refusal === null && item.about.kind === 'batch').reduce(withOne, batch)
}

function withOne(batch: BatchPage, item: OutboxItem): BatchPage {
  const device = { recordedAt: item.keptAt, by: 'this tablet', isFromPaper: false }
  const at = typeof item.body['claimedAt'] === 'string' ? item.body['claimedAt'] : item.keptAt
  if (item.about.list === 'weighings') return withPortion(batch, item, { ...device, weighedAt: at })
  if (item.about.list === 'steps') return withStep(batch, item, { ...device, happenedAt: at })
  if (item.about.list === 'fills') {
    const jar = fillJarInput.safeParse(item.body).data
    if (!jar || batch.jars.some((one) => one.id === jar.id)) return batch
    return { ...batch, jars: [...batch.jars, { ...jar, ...device, filledAt: at }] }
  }
  const reading = batchReadingInput.safeParse(item.body).data
  if (!reading || batch.readings.some((one) => one.id === reading.id)) return batch
  const unknown = { value: null, instrument: null, instrumentDoubt: null, batchId: batch.id }
  return { ...batch, readings: [...batch.readings, { ...reading, ...unknown, ...device, readAt: at }] }
}

type Device = { recordedAt: string; by: string; isFromPaper: boolean }

function withPortion(batch: BatchPage, item: OutboxItem, device: Device & { weighedAt: string }): BatchPage {
  const input = weighInput.safeParse(item.body).data
  if (!input) return batch
  const weight = readWeight(input.actualTyped, input.tareTyped, input.supersedes !== null)
  if ('sentence' in weight) return batch
  const weighings = batch.weighings.map((line) => {
    if (line.id !== input.weighingId || line.portions.some((portion) => portion.id === input.id)) return line
    const { id, actualTyped: grossTyped, tareTyped, isLast, lot, balance, note, supersedes, reason } = input
    const typed = { id, grossTyped, tareTyped, isLast, lot, balance, note, supersedes, reason }
    const portion = { ...typed, ...device, weighingId: line.id, netG: weight.netG, balanceDoubt: null }
    const portions = [...line.portions, portion]
    const totalG = gramsIn(portions)
    const isKept = totalG > 0 && (line.actualG !== null || (supersedes === null && isLast))
    const version = line.version + 1
    return { ...line, portions, version, note, actualG: isKept ? totalG : null, weighedBy: device.by }
  })
  return { ...batch, weighings }
}

function withStep(batch: BatchPage, item: OutboxItem, device: Device & { happenedAt: string }): BatchPage {
  const input = doStepInput.safeParse(item.body).data
  if (!input) return batch
  const steps = batch.steps.map((step) => {
    if (step.id !== input.stepId || step.entries.some((entry) => entry.id === input.id)) return step
    const { id, stepId, kind, reason, note, actualSpeedRpm, actualMinutes, actualTemperatureC } = input
    const actual = { actualSpeedRpm, actualMinutes, actualTemperatureC, note }
    const entries = [...step.entries, { id, stepId, kind, reason, ...actual, ...device }]
    const done = kind === 'done' ? { ...actual, doneAt: device.happenedAt, doneBy: device.by } : {}
    return { ...step, ...done, entries, version: step.version + 1 }
  })
  return { ...batch, steps }
}

/** The lot of a line's newest portion: a second portion mostly comes out of the same can. */
export function lastLot(line: BatchPage['weighings'][number]): string {
  return currentPortions(line.portions).at(-1)?.lot ?? ''
}
