'use client'

import { useRef, useState } from 'react'
import { PhotosOnTheirWay } from '@/components/device/photos-on-their-way'
import { usePhotos } from '@/components/device/use-photos'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { batchPhotoKeys } from '@/lib/batch/keys'
import { dayAndHour } from './balance-choice'
import type { BatchWork } from './work'

/** What the microscope or the eye saw of the batch; the original is kept byte for byte. */
export function BatchPhotos({ work, isOpen }: { work: BatchWork; isOpen: boolean }) {
  const { batch } = work
  const [note, setNote] = useState('')
  const input = useRef<HTMLInputElement>(null)
  const { add, onTheirWay } = usePhotos({
    url: batchPhotoKeys.add(batch.code),
    fields: { note },
    about: { label: `Photo of ${batch.code}`, what: note, batchCode: batch.code },
    onSent: work.onSaved,
  })

  function take(file: File | undefined) {
    if (!file) return
    void add(file)
    setNote('')
    if (input.current) input.current.value = ''
  }

  if (!isOpen && !batch.photos.length) return null
  return (
    <div className="mt-6 max-w-[980px]">
      <h3 className="text-17 font-650">Photos of {batch.code}</h3>
      {batch.photos.length ? (
        <ul className="mt-2 flex flex-wrap gap-4">
          {batch.photos.map((photo) => (
            <li key={photo.id} className="max-w-[240px]">
              <a href={batchPhotoKeys.original(batch.code, photo.id)} className="block">
                {/* eslint-disable-next-line @next/next/no-img-element -- served through a permission check */}
                <img
                  src={batchPhotoKeys.preview(batch.code, photo.id)}
                  alt={`${batch.code}, ${photo.note || 'photo'}`}
                  className="h-40 w-auto border-2 border-ink"
                />
              </a>
              <p className="text-15 text-soft">
                {[photo.note, `${photo.by}, ${dayAndHour(photo.at)}`].filter(Boolean).join(', ')}
              </p>
            </li>
          ))}
        </ul>
      ) : null}
      {isOpen ? (
        <div data-screen-only className="mt-3 flex flex-wrap items-end gap-3">
          <Field
            label="What it shows"
            placeholder="microscope, 400 times"
            value={note}
            onText={setNote}
            wrap="w-[280px]"
          />
          <input
            ref={input}
            type="file"
            accept="image/jpeg,image/png"
            capture="environment"
            className="sr-only"
            aria-label={`A photo of ${batch.code}`}
            tabIndex={-1}
            onChange={(event) => take(event.target.files?.[0])}
          />
          <Button onClick={() => input.current?.click()}>Add a photo</Button>
        </div>
      ) : null}
      <PhotosOnTheirWay photos={onTheirWay} />
    </div>
  )
}
