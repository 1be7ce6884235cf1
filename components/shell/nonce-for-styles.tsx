'use client'

import { getNonce, setNonce } from 'get-nonce'

/**
 * The dialogs of radix lock scrolling with a style element; the policy wants the page's nonce on it. The document keeps
 * the policy it was loaded with, so a layout that is fetched anew, with a nonce of its own, changes nothing.
 */
export function NonceForStyles({ nonce }: { nonce: string }) {
  if (nonce && !getNonce()) setNonce(nonce)
  return null
}
