import { describe, expect, it } from 'vitest'
import { reconcileFlags } from '@/lib/flag/rules/reconcile'
import type { WantedFlag } from '@/lib/flag/rules/wanted'
import type { FrameFlag } from '@/lib/series/queries/frame'

const system = 'system'
const place = { batchId: 'b', studyStationId: 's', attribute: 'ph' }
const lean: WantedFlag = {
  ...place,
  rule: 'lean',
  level: 'leaning',
  readingId: 'r5',
  instrumentId: null,
  onDay: null,
  atWeeks: 6,
  sentence: '',
  evidence: {},
}
const doubt: WantedFlag = { ...lean, rule: 'out', level: 'doubt', readingId: 'r6' }
const kept = (want: WantedFlag, more: Partial<FrameFlag> = {}): FrameFlag => ({
  ...want,
  id: 'f',
  number: 1,
  state: 'open',
  settles: null,
  closedBy: null,
  wants: null,
  raisedAt: '2026-04-13T09:00:00.000Z',
  ...more,
})
const reconcile = (flags: FrameFlag[], wanted: WantedFlag[], only: string[] | null = null) =>
  reconcileFlags(flags, wanted, only && new Set(only), system)

describe('a rule that fires', () => {
  it('is raised once, and stays one flag whichever reading shows it', () => {
    expect(reconcile([], [lean]).raise).toEqual([lean])
    expect(reconcile([kept(lean)], [{ ...lean, readingId: 'r6' }])).toEqual({ raise: [], clear: [] })
  })

  it('is not raised again while answered, or closed by a person, and still firing', () => {
    expect(reconcile([kept(lean, { state: 'answered' })], [lean]).raise).toEqual([])
    expect(reconcile([kept(lean, { state: 'closed', closedBy: 'qa' })], [lean]).raise).toEqual([])
  })

  it('is raised again when it fires anew, or when only the program had closed it', () => {
    expect(
      reconcile([kept(lean, { state: 'closed', closedBy: 'qa' })], [{ ...lean, atWeeks: 10 }]).raise,
    ).toHaveLength(1)
    expect(reconcile([kept(lean, { state: 'closed', closedBy: system })], [lean]).raise).toHaveLength(1)
  })

  it('about another reading is another doubt, and a third jar a new question', () => {
    expect(reconcile([kept(doubt)], [{ ...doubt, readingId: 'r7' }]).raise).toHaveLength(1)
    const third = { ...doubt, evidence: { wants: 'a third jar' } }
    const { raise, clear } = reconcile([kept(doubt)], [third])
    expect([raise.length, clear.length]).toEqual([1, 1])
  })
})

describe('a rule that no longer fires', () => {
  it('clears its open flag, but not one that waits for QA, nor one of an attribute that was not looked at', () => {
    expect(reconcile([kept(lean)], []).clear).toHaveLength(1)
    expect(reconcile([kept(lean, { state: 'answered' })], []).clear).toHaveLength(0)
    expect(reconcile([kept(lean)], [], ['viscosity']).clear).toHaveLength(0)
  })
})
