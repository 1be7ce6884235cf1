'use client'

import { useEffect, useState } from 'react'
import { newId } from '@/lib/db/id'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import { photoKeys } from '@/lib/photo/keys'
import type { PhotoProposal } from '@/lib/science/photo-layers/propose'
import { measuringCopy, sizedCopy, type MeasuringCopy } from './measuring-copy'

export type PhotoToMeasure = {
  id: string
  takenAt: string
  /** In hand where it was taken on this device a moment ago, or waits to go out. */
  file: Blob | null
  isSent: boolean
}

export type Proposing =
  /** None: the server is not reached, or makes nothing of it. */
  { state: 'waiting' | 'none' } | { state: 'there'; proposal: PhotoProposal }

type Copy = MeasuringCopy & { url: string }

/** The copy to measure on: the server's, or made here of the photo in hand. */
export function useCopy({ id, file }: Pick<PhotoToMeasure, 'id' | 'file'>) {
  const [copy, setCopy] = useState<Copy | null>(null)
  const [isUnreadable, setUnreadable] = useState(false)

  useEffect(() => {
    let isOver = false
    let url: string | null = null
    async function begin() {
      const kept = file ? null : await reached(photoKeys.copy(id))
      const made = kept
        ? await sizedCopy(kept)
        : await measuringCopy(file ?? (await reached(photoKeys.original(id))) ?? new Blob())
      // Of a photo that went out without one: it came before copies did, or was sent while no page was open.
      if (!kept && !file) await sendCopy(id, made.blob).catch(() => undefined)
      if (isOver) return
      url = URL.createObjectURL(made.blob)
      setCopy({ ...made, url })
    }
    begin().catch(() => (isOver ? undefined : setUnreadable(true)))
    return () => {
      isOver = true
      if (url) URL.revokeObjectURL(url)
    }
  }, [id, file])

  return { copy, isUnreadable }
}

/** The copy to measure on, and what the server makes of it once it has it. By hand it works without the server too. */
export function useMeasuring(photo: PhotoToMeasure) {
  const { copy, isUnreadable } = useCopy(photo)
  const [proposing, setProposing] = useState<Proposing>({ state: 'waiting' })
  const { id, isSent } = photo

  useEffect(() => {
    if (!copy || !isSent) return
    let isOver = false
    void proposed(id, copy.blob).then((proposal) => {
      if (!isOver) setProposing(proposal ? { state: 'there', proposal } : { state: 'none' })
    })
    return () => {
      isOver = true
    }
  }, [id, copy, isSent])

  return { copy, proposing, isUnreadable }
}

async function reached(url: string): Promise<Blob | null> {
  const response = await fetch(url, { credentials: 'same-origin' }).catch(() => null)
  return response?.ok ? response.blob() : null
}

/** Null where the server is not reached or cannot read it: the lines are then set by hand. */
async function proposed(id: string, copy: Blob): Promise<PhotoProposal | null> {
  try {
    return await fetcher<PhotoProposal>(photoKeys.proposal(id)).catch(async (thrown: unknown) => {
      if (!(thrown instanceof ClientError) || thrown.status !== 404) throw thrown
      await sendCopy(id, copy)
      return fetcher<PhotoProposal>(photoKeys.proposal(id))
    })
  } catch {
    return null
  }
}

async function sendCopy(id: string, copy: Blob): Promise<void> {
  const form = new FormData()
  form.append('file', copy, 'copy.jpg')
  await send(photoKeys.copy(id), 'POST', form, { key: newId() })
}
