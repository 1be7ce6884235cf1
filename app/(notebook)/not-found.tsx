import type { Metadata } from 'next'
import { NothingHere } from '@/components/ui/nothing-here'

export const metadata: Metadata = { title: 'Nothing here' }

/** Inside the frame, so that one can go elsewhere. */
export default function NotFoundInNotebook() {
  return <NothingHere />
}
