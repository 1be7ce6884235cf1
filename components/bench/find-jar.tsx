'use client'

import { Suspense, useState, type FormEvent } from 'react'
import { LabelCamera } from '@/components/bench/later'
import { useCalledJar } from '@/components/bench/use-called-jar'
import { Button } from '@/components/ui/button'
import { Coming } from '@/components/ui/coming'
import { Dialog } from '@/components/ui/dialog'
import { Field } from '@/components/ui/field'
import type { Bench } from '@/lib/bench/queries/today'
import { readJarCode } from '@/lib/jar/rules/code'

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
  const { call, error, isBusy, forget } = useCalledJar(bench, onOpen)

  return (
    <Dialog isOpen onClose={onClose} title={isScanning ? 'Scan a label' : 'Which jar'} density="bench">
      {isScanning ? (
        <Suspense fallback={<Coming what="What reads labels" />}>
          <LabelCamera
            onRead={(read) => {
              setText(readJarCode(read) ?? read.slice(0, 40))
              forget()
              if (!isBusy) void call(read)
            }}
          />
        </Suspense>
      ) : null}
      <form
        onSubmit={(event: FormEvent) => {
          event.preventDefault()
          void call(text)
        }}
        className="flex flex-col gap-4"
      >
        <Field
          label="Code on the label"
          density="bench"
          value={text}
          onText={(typed) => {
            setText(typed)
            forget()
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
