import { refuse } from '@/lib/http/errors'
import type { CaseProposal, CaseState } from '@/lib/shelf-case/schema'

/** Whole months: at most what the evidence supports; fewer want a reason, provisional ones the lab's rule. */
export function assertProposal(proposal: CaseProposal, supportedMonths: number): void {
  if (proposal.periodAfterOpeningMonths !== null && proposal.periodAfterOpeningEvidence === '')
    throw refuse.invalid('A period after opening is entered with its evidence. Say what it rests on.', {
      periodAfterOpeningEvidence: 'Say what the period after opening rests on.',
    })
  if (proposal.kind === 'provisional') {
    const fields: Record<string, string> = {}
    if (proposal.provisionalRule === '')
      fields['provisionalRule'] = 'Write the lab’s own rule that gives these months.'
    if (proposal.reviewOn === null) fields['reviewOn'] = 'Name the day on which it is reviewed.'
    if (Object.keys(fields).length > 0)
      throw refuse.invalid(
        'A provisional shelf life rests on a written rule and is reviewed on a day.',
        fields,
      )
    return
  }
  if (proposal.proposedMonths > supportedMonths)
    throw refuse.invalid(
      `The evidence supports ${supportedMonths} months; more cannot be proposed. Propose ${supportedMonths} or fewer.`,
      { proposedMonths: `At most ${supportedMonths}.` },
    )
  if (proposal.proposedMonths < supportedMonths && proposal.whyFewer === '')
    throw refuse.invalid(
      `You propose ${proposal.proposedMonths} of ${supportedMonths} supported months. Say why fewer.`,
      { whyFewer: 'Say why fewer months are proposed.' },
    )
}

/** What carries a shelf life was planned with QA: a protocol approved afterwards does not mend the start. */
export function assertApprovedProtocol(study: { code: string; protocolApproval: string | null }): void {
  if (study.protocolApproval !== 'not approved') return
  throw refuse.conflict(
    `Study ${study.code} began on a version of its protocol that QA had not approved, so it cannot carry a signed shelf life. Start the study that is to carry one on an approved version.`,
  )
}

export function assertState(code: string, state: CaseState, wanted: CaseState, act: string): void {
  if (state === wanted) return
  throw refuse.conflict(`Case ${code} is ${state}, so it cannot be ${act}. ${nextAct[state]}`)
}

const nextAct: Record<CaseState, string> = {
  drafting: 'It must be put forward first.',
  'put forward': 'It waits for QA.',
  'sent back': 'Begin a new case from it.',
  signed: 'A signed case is only superseded by a new one.',
  superseded: 'Look at the case that superseded it.',
}

type Did = { putForwardById: string | null; createdById: string; readingAuthors: string[] }

/** Nobody signs own work: separation goes by what the person did, whatever the roles. Null where nothing bars. */
export function whyNotSign(personId: string, did: Did): string | null {
  if (did.putForwardById === personId || did.createdById === personId)
    return 'You put this case forward, so someone else signs it.'
  if (did.readingAuthors.includes(personId))
    return 'You logged or voided a reading in this study, so someone else signs it.'
  return null
}

export function assertMaySign(personId: string, did: Did): void {
  const why = whyNotSign(personId, did)
  if (why) throw refuse.conflict(why)
}
