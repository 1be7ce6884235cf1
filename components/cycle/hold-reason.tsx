import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'

const reasons = ['weekend', 'holiday', 'freezer out of use']

type Props = { label: string; reason: string; onReason: (reason: string) => void; error?: string | undefined }

export function HoldReason({ label, reason, onReason, error }: Props) {
  return (
    <>
      <div className="flex flex-wrap gap-3">
        {reasons.map((one) => (
          <Button key={one} density="bench" onClick={() => onReason(one)}>
            {one}
          </Button>
        ))}
      </div>
      <Field label={label} density="bench" value={reason} onText={onReason} {...(error ? { error } : {})} />
    </>
  )
}
