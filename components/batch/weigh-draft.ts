import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { currentPortions, gramsIn, readWeight, weighed } from '@/lib/batch/rules/weighing'
import { totalGrams } from '@/lib/science/making'
import { lastLot } from './with-kept'

type Line = BatchPage['weighings'][number]

export type WeighDraft = {
  weight: string
  tare: string
  /** Null: that of the last portion. */
  lot: string | null
  note: string
  reason: string
  /** The portion that is being corrected. */
  supersedes: string
}

export const emptyWeighDraft: WeighDraft = {
  weight: '',
  tare: '',
  lot: null,
  note: '',
  reason: '',
  supersedes: '',
}

/** What the line comes to with what is being typed. */
export function judged(line: Line, draft: WeighDraft, tolerancePercent: number) {
  const before = currentPortions(line.portions).filter((portion) => portion.id !== draft.supersedes)
  const read = draft.weight.trim() ? readWeight(draft.weight, draft.tare, draft.supersedes !== '') : null
  const netG = read && 'netG' in read ? read.netG : null
  const totalG = netG === null ? null : totalGrams([...before.map((portion) => portion.netG), netG])
  return {
    beforeG: gramsIn(before),
    netG,
    totalG,
    problem: read && 'sentence' in read ? read : null,
    verdict: totalG === null || totalG === 0 ? null : weighed(line.targetG, totalG, tolerancePercent),
    lot: draft.lot ?? lastLot(line),
  }
}

export type Judged = ReturnType<typeof judged>
