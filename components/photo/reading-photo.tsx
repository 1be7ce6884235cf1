import type { ReactNode } from 'react'
import { photoKeys } from '@/lib/photo/keys'
import type { EntryDetail } from '@/lib/reading/schema/entry'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { PhotoDrops } from './photo-drops'
import { PhotoSquares } from './photo-squares'
import { PhotoWithLines } from './photo-with-lines'

type Marks = Pick<EntryDetail, 'photoLines' | 'photoColour' | 'photoDrops'>

/** The photo a reading was measured on, under what it was measured by; the whole photo is one press away. */
export function ReadingPhoto({ detail, of }: { detail: Marks; of: string }) {
  const { photoLines, photoColour, photoDrops } = detail
  if (photoLines) {
    const { photoId, width, height, axisX, tiltDegrees, lines } = photoLines
    return (
      <Kept photoId={photoId} said={saidOf(photoLines)}>
        <PhotoWithLines
          {...{ width, height, axisX, tiltDegrees, lines }}
          src={photoKeys.copy(photoId)}
          alt={`Photo of ${of} with the lines it was measured by`}
        />
      </Kept>
    )
  }
  if (photoColour) {
    const { photoId, width, height, grey, sample, greyL } = photoColour
    return (
      <Kept photoId={photoId} said={`estimate beside a card of L* ${greyL}`}>
        <PhotoSquares
          {...{ width, height }}
          src={photoKeys.copy(photoId)}
          alt={`Photo of ${of} with the patches its colour was told from`}
          squares={[
            { name: 'Grey card', square: grey },
            { name: 'Sample', square: sample },
          ]}
        />
      </Kept>
    )
  }
  if (!photoDrops) return null
  const { photoId, width, height, bar, drops } = photoDrops
  return (
    <Kept photoId={photoId} said={`${drops.length} measured, bar of ${bar.um} micrometres`}>
      <PhotoDrops
        {...{ width, height, bar, drops }}
        src={photoKeys.copy(photoId)}
        alt={`Photo of ${of} with the drops that were measured`}
      />
    </Kept>
  )
}

function Kept({ photoId, said, children }: { photoId: string; said: string; children: ReactNode }) {
  return (
    <a href={photoKeys.copy(photoId)} className="block w-44">
      <span className="relative block border-2 border-ink">{children}</span>
      <span className="text-17 underline">{said}</span>
    </a>
  )
}

function saidOf({ lines, proposal }: PhotoLinesOfReading): string {
  if (!proposal?.lines) return 'lines set by hand'
  const isAsProposed = JSON.stringify(proposal.lines) === JSON.stringify(lines)
  return isAsProposed ? 'lines as proposed' : 'proposed, then moved by hand'
}
