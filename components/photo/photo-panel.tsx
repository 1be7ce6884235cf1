'use client'

import { Suspense, useRef, useState } from 'react'
import { PhotosOnTheirWay } from '@/components/device/photos-on-their-way'
import { Button } from '@/components/ui/button'
import { ComingDialog } from '@/components/ui/coming'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { photoKeys } from '@/lib/photo/keys'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { dayText } from '@/lib/report/rules'
import { Camera, Measure } from './later'
import { useJarPhotos } from './use-jar-photos'
import type { PhotoToMeasure } from './use-measuring'

type Props = {
  jar: BenchJarPage
  /** Null where no separation is asked of this jar. */
  onMeasured: ((lines: PhotoLinesOfReading) => void) | null
}

/** Photos of this jar: taken with the same framing each week or chosen as files; the original is kept byte for byte. */
export function PhotoPanel({ jar, onMeasured }: Props) {
  const { add, onTheirWay, sent } = useJarPhotos(jar, 'jar')
  const [isCamera, setCamera] = useState(false)
  const [measuring, setMeasuring] = useState<PhotoToMeasure | null>(null)
  const files = useRef<HTMLInputElement>(null)
  const before = sent.find((photo) => photo.pullJarId !== jar.pullJarId && photo.shows === 'jar')

  function choose(chosen: FileList | null) {
    for (const file of chosen ?? []) void add(file)
    if (files.current) files.current.value = ''
  }

  return (
    <div>
      <h2 className="text-22 font-650">Photos of this jar</h2>
      <p className="text-17 text-soft">
        One light, one scale, label turned away from the layers. The original is kept as it is.
      </p>
      <div className="mt-3 flex flex-wrap gap-3">
        <Button density="bench" onClick={() => setCamera(true)}>
          Take a photo
        </Button>
        <Button density="bench" onClick={() => files.current?.click()}>
          Choose files
        </Button>
        <input
          ref={files}
          id="photo"
          type="file"
          accept="image/jpeg,image/png"
          multiple
          className="sr-only"
          aria-label="Photo files"
          tabIndex={-1}
          onChange={(event) => choose(event.target.files)}
        />
      </div>
      <PhotosOnTheirWay
        photos={onTheirWay}
        act={({ id, file, refused }) =>
          onMeasured && file && !refused ? (
            <Button
              density="bench"
              className="mt-2"
              onClick={() => setMeasuring({ id, takenAt: jar.now, file, isSent: false })}
            >
              Measure
            </Button>
          ) : null
        }
      />
      <ul className="mt-4 flex flex-wrap items-end gap-4">
        {sent.slice(0, 8).map((photo) => (
          <li key={photo.id}>
            <a href={photoKeys.original(photo.id)} className="block">
              {/* eslint-disable-next-line @next/next/no-img-element -- served through a permission check */}
              <img
                src={photoKeys.preview(photo.id)}
                alt={`Jar ${jar.code}, ${dayText(photo.takenAt)}`}
                className="h-40 w-auto border-2 border-ink"
              />
              <span className="text-17">{dayText(photo.takenAt)}</span>
            </a>
            {onMeasured && photo.pullJarId === jar.pullJarId ? (
              <Button
                density="bench"
                className="mt-1"
                onClick={() =>
                  setMeasuring({ id: photo.id, takenAt: photo.takenAt, file: null, isSent: true })
                }
              >
                Measure
              </Button>
            ) : null}
          </li>
        ))}
      </ul>
      <Suspense
        fallback={
          <ComingDialog
            what={isCamera ? 'The camera' : 'What measures a photo'}
            title={isCamera ? 'Take a photo' : 'Measure on the photo'}
            density="bench"
            onClose={() => {
              setCamera(false)
              setMeasuring(null)
            }}
          />
        }
      >
        {isCamera ? (
          <Camera
            ghost={before ? photoKeys.preview(before.id) : null}
            onTake={(blob) => void add(blob)}
            onClose={() => setCamera(false)}
          />
        ) : null}
        {measuring && onMeasured ? (
          <Measure
            jar={jar}
            photo={
              // Sent meanwhile: the server can now propose.
              sent.some((photo) => photo.id === measuring.id) ? { ...measuring, isSent: true } : measuring
            }
            onUse={(lines) => {
              onMeasured(lines)
              setMeasuring(null)
            }}
            onClose={() => setMeasuring(null)}
          />
        ) : null}
      </Suspense>
    </div>
  )
}
