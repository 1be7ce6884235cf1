'use client'

import { setNonce } from 'get-nonce'

/** The dialogs of radix lock scrolling with a style element; the policy wants the page's nonce on it. */
export function NonceForStyles({ nonce }: { nonce: string }) {
  if (nonce) setNonce(nonce)
  return null
}
