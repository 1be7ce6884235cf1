'use client'

import { useEffect, useRef, useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'

type Props = {
  /** Address of the last photo of this jar, laid over the picture. */
  ghost: string | null
  onTake: (photo: Blob) => void
  onClose: () => void
}

type State = { kind: 'starting' | 'looking' | 'taking' } | { kind: 'none' }

/** The tablet's camera with the frame of every week: the jar's outline, the grey card's line, the last photo as a ghost. */
export default function Camera({ ghost, onTake, onClose }: Props) {
  const video = useRef<HTMLVideoElement>(null)
  const own = useRef<HTMLInputElement>(null)
  const [state, setState] = useState<State>({ kind: 'starting' })
  const [strength, setStrength] = useState(35)
  const [taken, setTaken] = useState(0)
  const [shape, setShape] = useState({ width: 4, height: 3 })

  useEffect(() => {
    let isOver = false
    let stream: MediaStream | null = null
    const stop = () => stream?.getTracks().forEach((track) => track.stop())
    async function begin() {
      // Missing on plain http from another machine: browsers give a camera to safe addresses only.
      if (!navigator.mediaDevices?.getUserMedia) throw new Error('no camera here')
      stream = await navigator.mediaDevices.getUserMedia({
        video: { facingMode: 'environment', width: { ideal: 4096 }, height: { ideal: 3072 } },
      })
      if (isOver || !video.current) return stop()
      video.current.srcObject = stream
      await video.current.play()
      setState({ kind: 'looking' })
    }
    begin().catch(() => (isOver ? undefined : setState({ kind: 'none' })))
    return () => {
      isOver = true
      stop()
    }
  }, [])

  async function take() {
    const view = video.current
    if (!view) return
    setState({ kind: 'taking' })
    const photo = await stillOf(view)
    if (photo) {
      onTake(photo)
      setTaken((count) => count + 1)
    }
    setState({ kind: 'looking' })
  }

  if (state.kind === 'none')
    return (
      <Dialog
        isOpen
        onClose={onClose}
        title="No camera on this page"
        sentence="The browser gives none to this address, or this device has none. Its own camera, or a file, does as well."
        density="bench"
        acts={
          <>
            <Button density="bench" onClick={onClose}>
              Leave
            </Button>
            <Button density="bench" kind="primary" onClick={() => own.current?.click()}>
              The device’s own camera
            </Button>
          </>
        }
      >
        <input
          ref={own}
          type="file"
          accept="image/jpeg,image/png"
          capture="environment"
          className="sr-only"
          aria-label="Take a photo"
          tabIndex={-1}
          onChange={(event) => {
            for (const file of event.target.files ?? []) onTake(file)
            onClose()
          }}
        />
      </Dialog>
    )
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Take a photo"
      density="bench"
      width={900}
      fills
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={state.kind === 'taking'}
            {...(state.kind === 'starting' ? { why: 'The camera is starting.' } : {})}
            onClick={() => void take()}
          >
            Take it
          </Button>
        </>
      }
    >
      <div className="grid min-h-0 flex-1 place-items-center [container-type:size]">
        {/* As the camera's picture is, so that the frame lies on the same place of each photo. */}
        <div
          className="relative overflow-hidden bg-ink outline outline-2 outline-ink"
          style={{
            width: `calc(min(100cqw, 100cqh * ${shape.width} / ${shape.height}) - 4px)`,
            aspectRatio: `${shape.width} / ${shape.height}`,
          }}
        >
          <video
            ref={video}
            muted
            playsInline
            aria-label="What the camera sees"
            onLoadedMetadata={({ currentTarget: { videoWidth: width, videoHeight: height } }) =>
              setShape({ width, height })
            }
            className="absolute inset-0 h-full w-full object-contain"
          />
          {ghost ? (
            // eslint-disable-next-line @next/next/no-img-element -- served through a permission check
            <img
              src={ghost}
              alt="The last photo of this jar"
              className="pointer-events-none absolute inset-0 h-full w-full object-contain"
              style={{ opacity: strength / 100 }}
            />
          ) : null}
          <Frame />
        </div>
      </div>
      <p role="status" className="text-17">
        {state.kind === 'starting'
          ? 'The camera is starting.'
          : taken > 0
            ? `${taken} taken, on the way. Take another, or leave.`
            : 'Jar into the outline, foot on the line, grey card into its corner.'}
      </p>
      {ghost ? (
        <label className="flex min-h-16 items-center gap-4 text-18">
          Last photo
          <input
            type="range"
            min={0}
            max={80}
            step={5}
            value={strength}
            onChange={(event) => setStrength(Number(event.target.value))}
            className="h-16 flex-1 accent-[var(--ink)]"
          />
          <span className="w-14 text-right">{strength} %</span>
        </label>
      ) : null}
    </Dialog>
  )
}

/** The same each week: outline of the jar, line of its foot, corner of the grey card. */
function Frame() {
  return (
    <svg viewBox="0 0 100 100" className="pointer-events-none absolute inset-0 h-full w-full" aria-hidden>
      {(['#0E1D17', '#FFFFFF'] as const).map((colour, i) => (
        <g key={colour} fill="none" stroke={colour} strokeWidth={i === 0 ? 1.4 : 0.6} strokeLinejoin="round">
          <path d="M34 16H66V24H64V82Q64 86 60 86H40Q36 86 36 82V24H34Z" />
          <path d="M4 86H34 M66 86H96" strokeDasharray="2 2" />
          <path d="M76 70H92V84H76Z" />
        </g>
      ))}
    </svg>
  )
}

/** The camera's own full picture where the browser can take one, else what is on the screen. */
async function stillOf(view: HTMLVideoElement): Promise<Blob | null> {
  const track = (view.srcObject as MediaStream | null)?.getVideoTracks()[0]
  const Still = (
    window as unknown as { ImageCapture?: new (track: MediaStreamTrack) => { takePhoto(): Promise<Blob> } }
  ).ImageCapture
  if (track && Still) {
    const photo = await new Still(track).takePhoto().catch(() => null)
    if (photo && photo.type === 'image/jpeg') return photo
  }
  const canvas = document.createElement('canvas')
  canvas.width = view.videoWidth
  canvas.height = view.videoHeight
  canvas.getContext('2d')!.drawImage(view, 0, 0)
  return new Promise((resolve) => canvas.toBlob(resolve, 'image/jpeg', 0.95))
}
