'use client'

import { useEffect, useRef, useState } from 'react'
import { makeSquareReader } from '@/components/bench/read-square'

type Props = {
  /** Called for each text that is read; the same text is not given twice in a row within two seconds. */
  onRead: (text: string) => void
}

type State = { kind: 'starting' } | { kind: 'looking' } | { kind: 'refused'; sentence: string }
type Torch = { isOn: boolean; set: (isOn: boolean) => Promise<void> }

/** Longest side of the picture that is searched: a label's square fills enough of it, and a slow tablet keeps up. */
const searchedPx = 800
const pauseMs = 120

/** The tablet's camera, looking for the square of a label. Loaded after the Bench stands. */
export default function LabelCamera({ onRead }: Props) {
  const video = useRef<HTMLVideoElement>(null)
  const [state, setState] = useState<State>({ kind: 'starting' })
  const [torch, setTorch] = useState<Torch | null>(null)
  const tell = useRef(onRead)
  useEffect(() => {
    tell.current = onRead
  })

  useEffect(() => {
    const shown = video.current
    if (!shown) return
    let isOver = false
    let stream: MediaStream | null = null
    let timer: ReturnType<typeof setTimeout> | undefined

    async function begin(view: HTMLVideoElement) {
      // Missing on plain http from another machine: browsers give a camera to safe addresses only.
      if (!navigator.mediaDevices?.getUserMedia) throw new Error('no camera here')
      stream = await navigator.mediaDevices.getUserMedia({
        video: { facingMode: 'environment', width: { ideal: 1280 }, height: { ideal: 720 } },
      })
      if (isOver) return stop()
      view.srcObject = stream
      await view.play()
      setState({ kind: 'looking' })
      setTorch(torchOf(stream.getVideoTracks()[0]))
      const read = await makeSquareReader()
      const canvas = document.createElement('canvas')
      let last = { text: '', at: 0 }
      async function look() {
        if (isOver) return
        const text = drawn(view, canvas) ? await read(canvas) : null
        if (isOver) return
        if (text && (text !== last.text || Date.now() - last.at > 2000)) {
          last = { text, at: Date.now() }
          tell.current(text)
        }
        timer = setTimeout(() => void look(), pauseMs)
      }
      await look()
    }

    function stop() {
      stream?.getTracks().forEach((track) => track.stop())
    }

    begin(shown).catch((error: unknown) => {
      if (!isOver) setState({ kind: 'refused', sentence: sentenceOf(error) })
    })
    return () => {
      isOver = true
      clearTimeout(timer)
      stop()
    }
  }, [])

  if (state.kind === 'refused') {
    return (
      <p role="status" className="text-18">
        {state.sentence}
      </p>
    )
  }
  return (
    <div className="relative overflow-hidden rounded border-2 border-ink bg-ink">
      <video
        ref={video}
        muted
        playsInline
        className="block aspect-[4/3] max-h-[46dvh] w-full object-cover"
        aria-label="What the camera sees"
      />
      <svg viewBox="0 0 100 75" className="absolute inset-0 h-full w-full" aria-hidden>
        <path
          d="M28 28V16H40 M60 16H72V28 M72 47V59H60 M40 59H28V47"
          fill="none"
          stroke="#FFFFFF"
          strokeWidth="1.6"
        />
      </svg>
      <p role="status" className="absolute bottom-0 left-0 right-0 bg-ink px-3 py-2 text-17 text-onink">
        {state.kind === 'starting' ? 'The camera is starting.' : 'Hold the label’s square into the corners.'}
      </p>
      {torch ? (
        <button
          type="button"
          aria-pressed={torch.isOn}
          className="absolute right-2 top-2 min-h-16 rounded border-2 border-rule bg-paper px-4 text-18"
          onClick={() => {
            const isOn = !torch.isOn
            void torch.set(isOn).then(() => setTorch({ ...torch, isOn }))
          }}
        >
          Lamp {torch.isOn ? 'off' : 'on'}
        </button>
      ) : null}
    </div>
  )
}

/** The middle of what is seen, small enough to be searched many times a second. */
function drawn(view: HTMLVideoElement, canvas: HTMLCanvasElement): boolean {
  const { videoWidth, videoHeight } = view
  if (videoWidth === 0 || videoHeight === 0) return false
  const scale = Math.min(1, searchedPx / Math.max(videoWidth, videoHeight))
  canvas.width = Math.round(videoWidth * scale)
  canvas.height = Math.round(videoHeight * scale)
  canvas.getContext('2d', { willReadFrequently: true })!.drawImage(view, 0, 0, canvas.width, canvas.height)
  return true
}

/** Known to some browsers only, and to no type of the DOM. */
function torchOf(track: MediaStreamTrack | undefined): Torch | null {
  const able = track?.getCapabilities?.() as { torch?: boolean } | undefined
  if (!track || !able?.torch) return null
  const set = (isOn: boolean) =>
    track.applyConstraints({ advanced: [{ torch: isOn } as MediaTrackConstraintSet] })
  return { isOn: false, set }
}

function sentenceOf(error: unknown): string {
  const name = error instanceof Error ? error.name : ''
  if (name === 'NotAllowedError')
    return 'This page may not use the camera. Allow it in the browser’s settings for this address, or type the code.'
  if (name === 'NotFoundError' || name === 'OverconstrainedError')
    return 'This device has no camera that can be used. Type the code, or use a label reader.'
  if (name === 'NotReadableError')
    return 'Another program has the camera. Close it and scan again, or type the code.'
  return 'The browser gives no camera to this address. It wants https, or this very machine. Type the code, or use a label reader.'
}
