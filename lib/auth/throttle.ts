import { createHash } from 'node:crypto'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import { createPool } from '@/lib/db/client'
import { databaseUrl } from '@/lib/env'
import { refuse } from '@/lib/http/errors'

// An account is slowed per address it is tried from, so that a stranger's tries never lock the owner out.
const perAccountAndAddress = { keyPrefix: 'try', points: 10, duration: 15 * 60 }
const perAddress = { keyPrefix: 'address', points: 60, duration: 15 * 60 }

type Limit = typeof perAddress

export type Attempt = { account: string; address: string }

/** Counts before the password is looked at, so that tries at the same moment count too. */
export async function countAttempt({ account, address }: Attempt): Promise<void> {
  await consume(perAddress, address)
  await consume(perAccountAndAddress, keyOf(account, address))
}

/** A right password gives back what its own tries took. */
export async function forgiveAttempt({ account, address }: Attempt): Promise<void> {
  await limiter(perAccountAndAddress).delete(keyOf(account, address))
  await limiter(perAddress).reward(address, 1)
}

/** For public acts that cost something, such as asking for a reset mail. */
export async function countRequest(what: string, address: string, points: number): Promise<void> {
  await consume({ keyPrefix: what, points, duration: 15 * 60 }, address)
}

async function consume(limit: Limit, key: string): Promise<void> {
  try {
    await limiter(limit).consume(key)
  } catch (thrown) {
    if (!(thrown instanceof RateLimiterRes)) throw thrown
    const seconds = Math.ceil(thrown.msBeforeNext / 1000)
    const minutes = Math.max(1, Math.ceil(seconds / 60))
    throw refuse.slowDown(
      `There were too many tries from here. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, then try again.`,
      seconds,
    )
  }
}

// Counting happens while a sign-in's transaction is open: on the same pool, ten sign-ins at once would hold all
// connections and wait for an eleventh.
const shared = globalThis as typeof globalThis & { stillstandCounters?: ReturnType<typeof createPool> }

function countersPool() {
  shared.stillstandCounters ??= createPool(databaseUrl('app'), 2)
  return shared.stillstandCounters
}

function limiter(limit: Limit): RateLimiterPostgres {
  return new RateLimiterPostgres({
    ...limit,
    storeClient: countersPool(),
    tableName: 'rate_limit',
    tableCreated: true,
    clearExpiredByTimeout: false,
  })
}

function keyOf(account: string, address: string): string {
  return createHash('sha256').update(`${account.trim().toLowerCase()}\n${address}`).digest('hex')
}
