import { describe, expect, it } from 'vitest'
import { isSettledHere } from '@/components/bench/kept-jars'
import { pagesByCode, pageToShow, type KnownDays } from '@/components/device/bench-data'
import { newItem, type OutboxItem } from '@/components/device/outbox-item'
import type { Bench } from '@/lib/bench/queries/today'

const jar = (pullJarId: string, code: string, dueOn: string) => ({
  ...{ pullJarId, code, dueOn, state: 'due', read: [] },
  fields: [{ attribute: 'look' }, { attribute: 'separation' }],
})
const days = {
  jars: [
    jar('p1', 'K7R2M', '2026-11-25'),
    jar('q1', 'H4T9W', '2026-12-02'),
    jar('p2', 'K7R2M', '2026-12-02'),
  ],
  instruments: [],
} as unknown as KnownDays
const twice = pagesByCode(days).get('K7R2M')!

const item = (kind: 'jar' | 'missed', pullJarId: string, body: Record<string, unknown>): OutboxItem =>
  newItem({ url: '/', body, about: { kind, label: '', code: 'K7R2M', pullJarId } })
const part = (attribute: string) => item('jar', 'p1', { isPartial: true, readings: [{ attribute }] })
const benchWith = (state: string) =>
  ({ stations: [{ jars: [{ ...jar('p1', 'K7R2M', '2026-11-25'), state }] }] }) as unknown as Bench
const shown = (items: OutboxItem[], bench?: Bench) => pageToShow(twice, bench, items).pullJarId

describe('a jar that two pulls ask for, on the device', () => {
  it('has both pages, the earlier due first', () => {
    expect(twice.map((page) => page.pullJarId)).toEqual(['p1', 'p2'])
    expect(shown([])).toBe('p1')
  })

  it('shows the second once the first is kept here, noted as not read, or read part by part; and the first again undone', () => {
    expect(shown([item('jar', 'p1', { readings: [] })])).toBe('p2')
    expect(shown([item('missed', 'p1', { kind: 'missed' })])).toBe('p2')
    expect(shown([part('look'), part('separation')])).toBe('p2')
    expect(shown([])).toBe('p1')
  })

  it('stays with the first while a part lacks, another takes its place, or it is only pulled early', () => {
    expect(shown([part('look')])).toBe('p1')
    expect(shown([item('missed', 'p1', { jarId: 'spare' })])).toBe('p1')
    expect(shown([item('missed', 'p1', { kind: 'pulled early' })])).toBe('p1')
    expect(shown([item('jar', 'q1', { readings: [] })])).toBe('p1')
  })

  it('goes by what the server said last of the first', () => {
    expect(shown([], benchWith('done'))).toBe('p2')
    expect(shown([], benchWith('resting'))).toBe('p1')
  })

  it('shows the first where both are settled, and a jar of which nothing can be read is not settled by that', () => {
    expect(shown([item('jar', 'p1', {}), item('jar', 'p2', {})])).toBe('p1')
    expect(isSettledHere([], { pullJarId: 'p1', fields: [], read: [] })).toBe(false)
  })
})
