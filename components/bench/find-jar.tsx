'use client'

import { lazy, Suspense, useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { Field } from '@/components/ui/field'
import type { Bench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/schema'
import { ClientError, fetcher } from '@/lib/http/fetcher'
import { readJarCode } from '@/lib/jar/rules'

/** Camera and decoder come only to those who scan. */
const LabelCamera = lazy(() => import('@/components/bench/label-camera'))

type Props = {
  bench: Bench
  /** With the camera, or with the code alone. A reader that types serves both. */
  isScanning: boolean
  onOpen: (code: string) => void
  onClose: () => void
}

/** A label is scanned with the camera or a reader that types, or its code is typed. A jar not asked for says so. */
export function FindJar({ bench, isScanning, onOpen, onClose }: Props) {
  const [text, setText] = useState('')
  const [error, setError] = useState<string | undefined>()
  const [isBusy, setBusy] = useState(false)

  async function find(given: string) {
    const code = readJarCode(given)
    if (!code) {
      setError('That is no jar’s code: five signs, the last one checks the others. Read the label again.')
      return
    }
    if (bench.stations.some((s) => s.jars.some((j) => j.code === code))) return onOpen(code)
    setBusy(true)
    try {
      await fetcher(benchKeys.jar(code))
      onOpen(code)
    } catch (refused) {
      setError(
        refused instanceof ClientError && refused.status !== 0
          ? refused.sentence
          : `Jar ${code} is not on today’s walk, and without network nothing more is known of it.`,
      )
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog isOpen onClose={onClose} title={isScanning ? 'Scan a label' : 'Which jar'} density="bench">
      {isScanning ? (
        <Suspense fallback={<p role="status">The camera is starting.</p>}>
          <LabelCamera
            onRead={(read) => {
              setText(readJarCode(read) ?? read.slice(0, 40))
              setError(undefined)
              if (!isBusy) void find(read)
            }}
          />
        </Suspense>
      ) : null}
      <form
        onSubmit={(event: FormEvent) => {
          event.preventDefault()
          void find(text)
        }}
        className="flex flex-col gap-4"
      >
        <Field
          label="Code on the label"
          density="bench"
          value={text}
          onText={(typed) => {
            setText(typed)
            setError(undefined)
          }}
          error={error}
          hint="A label reader types it and presses Enter by itself."
          autoCapitalize="characters"
          autoFocus={!isScanning}
          className="font-mono uppercase"
        />
        <Button type="submit" kind="primary" density="bench" busy={isBusy}>
          Open the jar
        </Button>
      </form>
    </Dialog>
  )
}
