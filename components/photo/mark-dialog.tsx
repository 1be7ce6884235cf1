'use client'

import { Suspense, useRef, useState, type ReactNode } from 'react'
import { PhotosOnTheirWay } from '@/components/device/photos-on-their-way'
import { Busy } from '@/components/ui/busy'
import { Button } from '@/components/ui/button'
import { ComingDialog } from '@/components/ui/coming'
import { Dialog } from '@/components/ui/dialog'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { newId } from '@/lib/db/id'
import { photoKeys } from '@/lib/photo/keys'
import type { PhotoShows } from '@/lib/photo/schema'
import { dayText } from '@/lib/report/rules'
import { Camera } from './later'
import type { MeasuringCopy } from './measuring-copy'
import { useJarPhotos } from './use-jar-photos'
import { useCopy } from './use-measuring'

export type OpenCopy = MeasuringCopy & { url: string }
type InHand = { id: string; file: Blob | null }
/** Of the dialog that it all happens in. */
type Frame = { title: string; onClose: () => void }
export type MarkedPhoto = { photoId: string; copy: OpenCopy; frame: Frame }
type Props = {
  jar: BenchJarPage
  shows: PhotoShows
  title: string
  /** What the photo must hold, before one is chosen. */
  ask: string
  onClose: () => void
  /** The `MarkTable` of the chosen photo. */
  children: (photo: MarkedPhoto) => ReactNode
}

/** A photo of this jar in this pull, taken or chosen, and then marked. */
export function MarkDialog({ jar, shows, title, ask, onClose, children }: Props) {
  const [inHand, setInHand] = useState<InHand | null>(null)
  const frame = { title: `${title}: ${jar.name}`, onClose }
  if (inHand)
    return (
      <Opened photo={inHand} frame={frame} onAnother={() => setInHand(null)}>
        {(copy) => children({ photoId: inHand.id, copy, frame })}
      </Opened>
    )
  return (
    <Dialog isOpen {...frame} density="bench" width={1120}>
      <Choice jar={jar} shows={shows} ask={ask} onChoose={setInHand} />
    </Dialog>
  )
}

type OpenedProps = {
  photo: InHand
  frame: Frame
  onAnother: () => void
  children: (copy: OpenCopy) => ReactNode
}

function Opened({ photo, frame, onAnother, children }: OpenedProps) {
  const { copy, isUnreadable } = useCopy(photo)
  if (copy) return children(copy)
  if (!isUnreadable)
    return (
      <Dialog isOpen {...frame} density="bench">
        <p role="status" className="flex items-center gap-3">
          <Busy /> The photo is being opened.
        </p>
      </Dialog>
    )
  return (
    <Dialog
      isOpen
      {...frame}
      density="bench"
      acts={
        <Button density="bench" onClick={onAnother}>
          Another photo
        </Button>
      }
    >
      <p role="alert">This photo cannot be opened here. Take it again, or choose another.</p>
    </Dialog>
  )
}

type ChoiceProps = Pick<Props, 'jar' | 'shows' | 'ask'> & { onChoose: (photo: InHand) => void }

function Choice({ jar, shows, ask, onChoose }: ChoiceProps) {
  const { add, onTheirWay, sent } = useJarPhotos(jar, shows)
  const [isCamera, setCamera] = useState(false)
  const files = useRef<HTMLInputElement>(null)
  const here = sent.filter((photo) => photo.pullJarId === jar.pullJarId)

  /** Kept and sent in the background; it can be marked meanwhile. */
  function take(file: Blob | undefined) {
    if (!file) return
    const id = newId()
    void add(file, {}, id)
    onChoose({ id, file })
  }

  return (
    <div className="grid gap-4">
      <p className="max-w-[720px]">{ask}</p>
      <div className="flex flex-wrap gap-3">
        <Button density="bench" kind="primary" onClick={() => setCamera(true)}>
          Take a photo
        </Button>
        <Button density="bench" onClick={() => files.current?.click()}>
          Choose a file
        </Button>
        <input
          ref={files}
          type="file"
          accept="image/jpeg,image/png"
          className="sr-only"
          aria-label="Photo file to mark"
          tabIndex={-1}
          onChange={(event) => take(event.target.files?.[0])}
        />
      </div>
      <PhotosOnTheirWay
        photos={onTheirWay}
        act={({ id, file, refused }) =>
          file && !refused ? (
            <Button density="bench" className="mt-2" onClick={() => onChoose({ id, file })}>
              Use this one
            </Button>
          ) : null
        }
      />
      {here.length > 0 ? <h3 className="text-20 font-650">Taken in this pull</h3> : null}
      <ul className="flex flex-wrap gap-4">
        {here.map((photo) => (
          <li key={photo.id}>
            <button
              type="button"
              onClick={() => onChoose({ id: photo.id, file: null })}
              className="block border-2 border-ink text-left active:opacity-80"
            >
              {/* eslint-disable-next-line @next/next/no-img-element -- served through a permission check */}
              <img
                src={photoKeys.preview(photo.id)}
                alt={`Use the photo of ${dayText(photo.takenAt)}`}
                className="h-40 w-auto"
              />
            </button>
          </li>
        ))}
      </ul>
      <Suspense
        fallback={
          <ComingDialog
            what="The camera"
            title="Take a photo"
            density="bench"
            onClose={() => setCamera(false)}
          />
        }
      >
        {isCamera ? (
          <Camera
            ghost={null}
            onTake={(photo) => {
              setCamera(false)
              take(photo)
            }}
            onClose={() => setCamera(false)}
          />
        ) : null}
      </Suspense>
    </div>
  )
}
