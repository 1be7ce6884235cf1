import type { PhotoProposal } from '@/lib/science/photo-layers/propose'
import type { Proposing } from './use-measuring'

type Props = { proposing: Proposing; isMoved: boolean; isSent: boolean }

/** How sure the proposal is, in words, and what to do about it. */
export function SureWords({ proposing, isMoved, isSent }: Props) {
  return (
    <div role="status">
      <p className="text-22 font-650">{headline(proposing, isSent)}</p>
      {proposing.state === 'there'
        ? proposing.proposal.reasons.map((reason) => (
            <p key={reason} className="text-17">
              {reason}
            </p>
          ))
        : null}
      <p className="text-17 text-soft">
        {isMoved
          ? 'Moved by hand; the proposal is kept beside it.'
          : 'Drag a line, or move it with the buttons or arrow keys.'}
      </p>
    </div>
  )
}

function headline(proposing: Proposing, isSent: boolean): string {
  if (proposing.state === 'there') return told(proposing.proposal)
  if (!isSent) return 'The photo waits on this tablet. Set the lines by hand.'
  return proposing.state === 'waiting'
    ? 'Set the lines; a proposal is on its way.'
    : 'No proposal. Set the lines by hand.'
}

function told({ sureness, lines }: PhotoProposal): string {
  if (sureness === 'sure') return 'Sure. Check the lines all the same.'
  if (sureness === 'shows nothing') return 'Nothing shows through this jar. Do not measure it on a photo.'
  return lines ? 'Not sure. Look again at each line.' : 'Not sure. Set the lines by hand.'
}
