import { Server, type IncomingMessage } from 'node:http'
import { env } from '@/lib/env'
import { readablePath } from '@/lib/address/rules'

const header = 'x-stillstand-address'
const state = globalThis as typeof globalThis & { stillstandAddress?: true }

/**
 * Before anything reads a request: the address it asks for is made readable, and the socket's is written into a header of
 * our own. Next passes on whatever X-Forwarded-For the caller made up, so that one cannot slow down a guesser.
 */
export function installAddress(): void {
  if (state.stillstandAddress) return
  state.stillstandAddress = true
  const { prototype } = Server
  const emit = prototype.emit
  prototype.emit = function (this: Server, event: string, ...rest: unknown[]): boolean {
    if (event === 'request' || event === 'upgrade') {
      const request = rest[0] as IncomingMessage
      if (request.url) request.url = readablePath(request.url)
      request.headers[header] = request.socket.remoteAddress ?? 'unknown'
    }
    return Reflect.apply(emit, this, [event, ...rest])
  } as typeof emit
}

/** STILLSTAND_PROXIES=1 means: one proxy of ours stands in front, believe the last entry of X-Forwarded-For. */
export function clientAddress(request: Request): string {
  const trusted = env().trustedProxies
  if (trusted > 0) {
    const hops = (request.headers.get('x-forwarded-for') ?? '').split(',').map((hop) => hop.trim())
    const claimed = hops.at(-trusted)
    if (claimed) return claimed
  }
  // Until it is installed the header is the caller's own word and worth nothing.
  return (state.stillstandAddress && request.headers.get(header)) || 'unknown'
}
