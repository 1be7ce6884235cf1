import type { BatchPage } from '@/lib/batch/queries/get-batch'
import type { BatchOutbox } from './use-batch-outbox'

/** What every part of the batch's screen works with. */
export type BatchWork = {
  batch: BatchPage
  personId: string
  mayWrite: boolean
  isBench: boolean
  outbox: BatchOutbox
  /** When it is done: now, or the time that stands on the paper sheet. */
  claim: () => { claimedAt: string; isFromPaper: boolean }
  onSaved: () => Promise<unknown>
}
