import { photoKeys } from '@/lib/photo/keys'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { PhotoWithLines } from './photo-with-lines'

/** The photo a reading was measured on, under the lines it was measured by; the whole photo is one press away. */
export function ReadingPhoto({ lines, of }: { lines: PhotoLinesOfReading; of: string }) {
  const { photoId, width, height, axisX, tiltDegrees } = lines
  return (
    <a href={photoKeys.copy(photoId)} className="block w-44">
      <span className="relative block border-2 border-ink">
        <PhotoWithLines
          {...{ width, height, axisX, tiltDegrees, lines: lines.lines }}
          src={photoKeys.copy(photoId)}
          alt={`Photo of ${of} with the lines it was measured by`}
        />
      </span>
      <span className="text-17 underline">{saidOf(lines)}</span>
    </a>
  )
}

function saidOf({ lines, proposal }: PhotoLinesOfReading): string {
  if (!proposal?.lines) return 'lines set by hand'
  const isAsProposed = JSON.stringify(proposal.lines) === JSON.stringify(lines)
  return isAsProposed ? 'lines as proposed' : 'proposed, then moved by hand'
}
