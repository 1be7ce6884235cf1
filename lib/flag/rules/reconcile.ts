import type { FrameFlag } from '@/lib/series/queries/frame'
import type { WantedFlag } from './wanted'

const sameRun = 0.01

/**
 * What is to be raised and what no longer holds. A flag that is open or answered stands for its rule while that
 * fires; one that a person closed stands for the run it was raised in, so a rule that stops and fires again is
 * raised again.
 */
export function reconcileFlags(
  flags: readonly FrameFlag[],
  wanted: readonly WantedFlag[],
  only: ReadonlySet<string> | null,
  systemId: string,
): { raise: WantedFlag[]; clear: FrameFlag[] } {
  const stands = (flag: FrameFlag, want: WantedFlag) =>
    keyOf(flag, flag.wants) === keyOf(want, want.evidence['wants']) &&
    (flag.state !== 'closed' ||
      (flag.closedBy !== systemId && Math.abs((flag.atWeeks ?? 0) - want.atWeeks) < sameRun))
  return {
    raise: wanted.filter((want) => !flags.some((flag) => stands(flag, want))),
    clear: flags.filter(
      (flag) =>
        flag.state === 'open' &&
        (only === null || only.has(flag.attribute)) &&
        !wanted.some((want) => stands(flag, want)),
    ),
  }
}

type Keyed = Pick<
  WantedFlag,
  'batchId' | 'studyStationId' | 'attribute' | 'rule' | 'readingId' | 'instrumentId' | 'onDay'
> & { level: string }

function keyOf(flag: Keyed, wants: unknown): string {
  const where = [flag.studyStationId, flag.attribute, flag.rule, flag.level]
  if (flag.instrumentId) return JSON.stringify([...where, flag.instrumentId, flag.onDay])
  // A standing belongs to the series, whichever reading shows it; a doubt to its reading.
  return JSON.stringify([
    ...where,
    flag.batchId,
    flag.level === 'doubt' ? [flag.readingId, wants ?? null] : null,
  ])
}
