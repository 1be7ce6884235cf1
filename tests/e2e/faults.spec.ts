import { killServer } from '@/lib/cli/faults/kill-server'
import { projectRoot as root } from '../support/e2e-labs'
import { expect, test } from './watch'

test('D01, D03, D05: what the server acknowledged stands once, however often it is killed', async () => {
  test.setTimeout(240_000)
  const { figures, refused } = await killServer({ root, saves: 200, kills: 10, writers: 8 })
  expect(refused).toEqual([])
  expect(figures.filter(({ isMet }) => isMet === false)).toEqual([])
  expect(figures.filter(({ isMet }) => isMet === true).length).toBeGreaterThan(6)
})
