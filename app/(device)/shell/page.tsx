import type { Metadata } from 'next'
import { OfflineNotebook } from '@/components/device/offline-notebook'

export const permission = 'public'
export const metadata: Metadata = { title: 'Without network' }

/** The one page that the service worker keeps: it holds nobody's data and is shown where the network is away. */
export default function ShellPage() {
  return <OfflineNotebook />
}
