'use client'

import { useRef } from 'react'
import useSWR from 'swr'
import type { Slot } from '@/components/bench/draft'
import { slotLabel } from '@/components/bench/verdict'
import { PhotosOnTheirWay } from '@/components/device/photos-on-their-way'
import { usePhotos } from '@/components/device/use-photos'
import { Button } from '@/components/ui/button'
import { TextArea } from '@/components/ui/text-area'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { fetcher } from '@/lib/http/fetcher'
import { photoKeys } from '@/lib/photo/schema'
import { dayText } from '@/lib/report/rules'

/** Words against the initial: one tap each, the same as last time first at hand. */
export function WordPanel({
  slot,
  text,
  onText,
}: {
  slot: Slot
  text: string
  onText: (text: string) => void
}) {
  const last = slot.field.last[0]
  return (
    <div>
      <h2 className="text-22 font-650">{slotLabel(slot)}</h2>
      <p className="text-17 text-soft">
        {slot.field.method}
        {last?.word ? ` Last: ${last.word}, ${dayText(last.day)}.` : ''}
      </p>
      <div
        className="mt-3 grid grid-cols-1 gap-3 sm:grid-cols-2"
        role="radiogroup"
        aria-label={slotLabel(slot)}
      >
        {(slot.field.words ?? []).map((word) => (
          <button
            key={word}
            type="button"
            role="radio"
            aria-checked={text === word}
            onClick={() => onText(word)}
            className={`min-h-[72px] rounded px-5 text-left text-22 ${text === word ? 'border-[3px] border-ink bg-paper font-700' : 'border-2 border-rule bg-ground'}`}
          >
            {word}
          </button>
        ))}
      </div>
    </div>
  )
}

export function NotePanel({ note, onNote }: { note: string; onNote: (note: string) => void }) {
  return (
    <TextArea
      label="Note"
      density="bench"
      value={note}
      onText={onNote}
      rows={4}
      hint="What you saw that no field asks for. It stays with the jar and the pull."
    />
  )
}

type Photo = { id: string; takenAt: string; takenBy?: string }

/** Photos of this jar: the camera or a file; the original is kept byte for byte. */
export function PhotoPanel({ jar }: { jar: BenchJarPage }) {
  const { data: photos, mutate } = useSWR<Photo[]>(photoKeys.ofJar(jar.study.code, jar.code), fetcher)
  const input = useRef<HTMLInputElement>(null)
  const { add, onTheirWay } = usePhotos({
    url: photoKeys.add,
    fields: { pullJarId: jar.pullJarId },
    about: {
      ...{ label: `Photo of jar ${jar.name}`, code: jar.code, pullJarId: jar.pullJarId },
      href: `/bench/${jar.code}`,
    },
    onSent: () => mutate(),
  })

  function take(file: File | undefined) {
    if (file) void add(file)
    if (input.current) input.current.value = ''
  }

  return (
    <div>
      <h2 className="text-22 font-650">Photos of this jar</h2>
      <p className="text-17 text-soft">
        One light, one scale, label to the front. The original is kept as it is.
      </p>
      <div className="mt-3 flex flex-wrap items-end gap-3">
        {(photos ?? []).slice(0, 8).map((photo) => (
          <a key={photo.id} href={photoKeys.original(photo.id)} className="block">
            {/* eslint-disable-next-line @next/next/no-img-element -- served through a permission check */}
            <img
              src={photoKeys.preview(photo.id)}
              alt={`Jar ${jar.code}, ${dayText(photo.takenAt)}`}
              className="h-40 w-auto border-2 border-ink"
            />
            <span className="text-14">{dayText(photo.takenAt)}</span>
          </a>
        ))}
        <input
          ref={input}
          id="photo"
          type="file"
          accept="image/jpeg,image/png"
          capture="environment"
          className="sr-only"
          aria-label="Take a photo"
          tabIndex={-1}
          onChange={(event) => take(event.target.files?.[0])}
        />
        <Button density="bench" onClick={() => input.current?.click()}>
          Take a photo
        </Button>
      </div>
      <PhotosOnTheirWay photos={onTheirWay} />
    </div>
  )
}
