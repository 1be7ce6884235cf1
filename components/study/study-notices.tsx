import type { ShownStudy } from '@/lib/study/queries/sheet'

/** What whoever reads the sheet must know before its figures: what it can never carry. */
export function StudyNotices({ study }: { study: ShownStudy }) {
  if (study.protocolApproval !== 'not approved') return null
  return (
    <p className="mt-2 text-15">
      QA had not approved version {study.protocolNumber} of {study.protocolCode} when this study began:{' '}
      <b>it cannot carry a signed shelf life.</b>
    </p>
  )
}
