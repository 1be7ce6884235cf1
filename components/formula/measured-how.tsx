import { measuringMethods } from '@/lib/formula/rules/measuring'
import type { EmulsionType } from '@/lib/formula/schema'

/** What stands outside decides how pH and viscosity can be read at all. */
export function MeasuredHow({ type }: { type: EmulsionType }) {
  const { ph, viscosity } = measuringMethods(type)
  return (
    <dl className="mt-6 grid gap-x-8 gap-y-3 text-14 sm:grid-cols-2">
      <div>
        <dt className="font-600">How its pH is read</dt>
        <dd className="text-soft">{ph} [practice]</dd>
      </div>
      <div>
        <dt className="font-600">How its viscosity is read</dt>
        <dd className="text-soft">{viscosity} [practice]</dd>
      </div>
    </dl>
  )
}
