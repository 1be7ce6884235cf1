import { attributeName } from '@/lib/reading/schema/attributes'
import type { Computed } from '@/lib/shelf-case/rules/build'

type Facts = { state: string; proposedMonths: number | null; storageStatement: string; kind: string }

const acts: Record<string, string> = {
  drafting: 'in draft',
  'put forward': 'proposed',
  'sent back': 'sent back',
  signed: 'signed',
  superseded: 'superseded',
}

/** The finding of a case: months and where it stands, then what carries or limits it, then what to weigh. */
export function caseHeadline(
  facts: Facts,
  content: Computed,
): { lead: string; rest: string; sentence: string } {
  const months = facts.proposedMonths ?? 0
  const limiting = content.attributes.find((a) => a.attribute === content.limitingAttribute)
  const name = (key: string) => {
    const label = attributeName(key)
    return label === 'pH' ? label : label.toLowerCase()
  }
  const carries = limiting
    ? facts.kind === 'provisional'
      ? '; a provisional figure by the lab’s own rule'
      : `; ${name(limiting.attribute)} carries ${limiting.supportedMonths}`
    : ''
  const stand = content.weakens.filter((w) => w.state === 'stands').length
  const answered = content.weakens.filter((w) => w.state === 'answered').length
  const decides =
    limiting?.decidedBy && content.batches.length > 1
      ? ` Batch ${limiting.decidedBy} alone sets the limit.`
      : ''
  return {
    lead: `${months} ${months === 1 ? 'month' : 'months'}`,
    rest: `${months === 1 ? 'is' : 'are'} ${acts[facts.state] ?? facts.state}${carries}`,
    sentence: `${capital(facts.storageStatement)}.${decides} ${count(stand, 'doubt stands', 'doubts stand')}, ${answered === 0 ? 'none is answered' : count(answered, 'is answered', 'are answered').toLowerCase()}.`,
  }
}

const numbers = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten']

function count(n: number, one: string, many: string): string {
  return `${numbers[n] ?? n} ${n === 1 ? one : many}`
}

function capital(text: string): string {
  return (text.charAt(0).toUpperCase() + text.slice(1)).replace(/\.$/, '')
}
