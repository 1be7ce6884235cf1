import type { Metadata } from 'next'
import { Trust } from '@/components/flag/trust'
import { page } from '@/lib/http/page'

export const permission = 'reading.read'
export const metadata: Metadata = { title: 'How far to trust a flag' }

export default async function TrustPage() {
  await page(permission)
  return <Trust />
}
