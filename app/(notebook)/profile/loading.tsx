import { Busy } from '@/components/ui/busy'

export default function Loading() {
  return (
    <p role="status" className="flex items-center gap-3 pt-10 text-17">
      <Busy /> Fetching your profile
    </p>
  )
}
