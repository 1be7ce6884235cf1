'use client'

import { useSyncExternalStore } from 'react'

/**
 * Whether the Bench would open and work without network: the worker of this build answers for the page, which it does
 * only once it has kept the shell and every file of it, and the coming days are on the device.
 */
export function useReady(areDaysKept: boolean): boolean {
  return useSyncExternalStore(onChange, isServed, () => false) && areDaysKept
}

function onChange(listen: () => void): () => void {
  navigator.serviceWorker?.addEventListener('controllerchange', listen)
  return () => navigator.serviceWorker?.removeEventListener('controllerchange', listen)
}

function isServed(): boolean {
  const worker = navigator.serviceWorker?.controller
  return worker?.scriptURL.endsWith(workerAddress) ?? false
}

/** A build has a worker of its own, which brings its own shell. */
export const workerAddress = `/sw.js?build=${process.env['STILLSTAND_BUILD']}`
