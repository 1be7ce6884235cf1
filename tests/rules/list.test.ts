import { describe, expect, it } from 'vitest'
import { isNarrowed, fileAddress, listAddress } from '@/lib/list/rules'
import { choice, day, describeList } from '@/lib/list/schema'

type Row = { code: string; size: number }
const list = describeList<Row>()({
  name: 'things',
  sort: 'code',
  order: 'desc',
  columns: [
    { key: 'code', title: 'code', sort: 'text', value: (row) => row.code },
    { key: 'size', title: 'size', kind: 'number', sort: 'number', value: (row) => row.size },
    { key: 'note', title: 'note', isExtra: true, value: () => '' },
  ],
  filters: {
    state: choice('State', ['open', 'closed'], 'open'),
    client: choice('Client'),
    from: day('From'),
  },
})
const read = (given: Record<string, unknown>) => list.query.parse(given)
const again = (address: string) => read(Object.fromEntries(new URL(address, 'http://x').searchParams))

describe('the address of a list', () => {
  it('says nothing that goes without saying', () => {
    expect(listAddress('/things', list, read({}))).toBe('/things')
    expect(read({})).toMatchObject({ sort: 'code', order: 'desc', columns: ['code', 'size'], place: null })
  })

  it('comes back as it was written', () => {
    const query = read({
      ...{ q: 'a b', sort: 'size', order: 'asc', columns: 'note,code', state: 'any', client: 'Fern & Co' },
      ...{ from: '2026-02-28', after: 'token' },
    })
    expect(query.filters).toEqual({ state: '', client: 'Fern & Co', from: '2026-02-28' })
    expect(query.columns).toEqual(['code', 'note'])
    const same = listAddress('/things', list, query, { place: query.place })
    expect(again(same)).toEqual(query)
  })

  it('begins again at the first page unless only the columns change', () => {
    const query = read({ after: 'token' })
    expect(again(listAddress('/things', list, query, { columns: ['note'] })).place).toEqual({
      side: 'after',
      token: 'token',
    })
    for (const change of [{ sort: 'size' }, { q: 'x' }, { filters: { state: 'closed' } }])
      expect(again(listAddress('/things', list, query, change)).place).toBeNull()
    expect(fileAddress('/things', list, query, 'xlsx')).toBe('/api/things/export?format=xlsx')
  })

  it('falls back where it says what cannot be', () => {
    const odd = read({
      ...{ q: ['twice', 'given'], sort: 'note', order: 'up', columns: 'nothing,__proto__' },
      ...{ state: 'ajar', from: '2026-02-30' },
    })
    expect(odd).toMatchObject({ q: 'twice', sort: 'code', order: 'desc', columns: ['code', 'size'] })
    expect(odd.filters).toEqual({ state: 'open', client: '', from: '' })
  })

  it('knows whether rows are left out', () => {
    expect(isNarrowed(list, read({ sort: 'size', columns: 'note' }))).toBe(false)
    for (const given of [{ q: 'x' }, { state: 'closed' }, { state: 'any' }, { client: 'x' }])
      expect(isNarrowed(list, read(given))).toBe(true)
  })
})
