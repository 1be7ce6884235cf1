import type { Metadata } from 'next'
import { NothingHere } from '@/components/ui/nothing-here'

export const metadata: Metadata = { title: 'Nothing here' }

export default function NotFound() {
  return (
    <main className="px-4 sm:px-10">
      <NothingHere />
    </main>
  )
}
