import { afterEach, beforeEach, expect, it, vi } from 'vitest'
import { whenReached } from '@/components/ui/load-ahead'

beforeEach(() => vi.useFakeTimers())
afterEach(() => {
  vi.useRealTimers()
  vi.unstubAllGlobals()
})

const away = () => Promise.reject(new Error('the script did not come'))

it('what is asked for without network comes once it is back, however long that takes', async () => {
  vi.stubGlobal('navigator', { onLine: false })
  const load = vi.fn(away as () => Promise<string>)
  const asked = whenReached(load)
  await vi.advanceTimersByTimeAsync(3_600_000)
  expect(load.mock.calls.length).toBeGreaterThan(100)
  vi.stubGlobal('navigator', { onLine: true })
  load.mockImplementation(() => Promise.resolve('camera'))
  await vi.advanceTimersByTimeAsync(1_000)
  expect(await asked).toBe('camera')
})

it('what goes on failing while there is a network is told after half a minute', async () => {
  vi.stubGlobal('navigator', { onLine: true })
  const load = vi.fn(away)
  const asked = expect(whenReached(load)).rejects.toThrow('the script did not come')
  await vi.advanceTimersByTimeAsync(29_000)
  expect(load.mock.calls.length).toBeLessThan(31)
  await vi.advanceTimersByTimeAsync(2_000)
  await asked
})
