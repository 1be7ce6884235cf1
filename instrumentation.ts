import type { Instrumentation } from 'next'

/** Runs once, before the server takes its first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return
  const { env } = await import('@/lib/env')
  env()
  const { installAddress } = await import('@/lib/http/address')
  installAddress()
}

export const onRequestError: Instrumentation.onRequestError = async (error, request) => {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return
  const { log } = await import('@/lib/http/log')
  log.error({ err: error, method: request.method, path: request.path }, 'a page failed')
}
