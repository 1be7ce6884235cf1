import path from 'node:path'
import { Worker } from 'node:worker_threads'

const longestMs = 60_000
// From the project's folder and not from this module's address: the bundler moves modules, not this file.
const workerFile = path.join(process.cwd(), 'lib', 'files', 'picture-worker.mjs')

export type Encoded = {
  bytes: Uint8Array
  type: string
  /** How it is to be turned, as EXIF counts. */
  orientation: number
}
export type Pixels = { width: number; height: number; data: Uint8Array }

/** A JPEG of this width at most, upright. Throws where the picture cannot be decoded. */
export function makePreview(picture: Encoded, width: number): Promise<Uint8Array> {
  return inTurn<Uint8Array>({ ...picture, fit: { width }, as: 'jpeg' })
}

/** Its pixels upright, red, green, blue and alpha, made smaller to this many rows at most. */
export function readPixels(picture: Encoded, rows: number): Promise<Pixels> {
  return inTurn<Pixels>({ ...picture, fit: { height: rows }, as: 'pixels' })
}

let before: Promise<unknown> = Promise.resolve()

/** One at a time in each process: two bitmaps of a camera would take a gigabyte. */
function inTurn<T>(task: object): Promise<T> {
  const mine = before.then(() => work<T>(task))
  before = mine.catch(() => undefined)
  return mine
}

function work<T>(task: object): Promise<T> {
  return new Promise((resolve, reject) => {
    // Plain JavaScript: the loader that the process itself was started with would only be read once more, for each picture.
    const worker = new Worker(workerFile, { workerData: task, execArgv: [] })
    const timer = setTimeout(() => {
      void worker.terminate()
      reject(new Error(`The picture took longer than ${longestMs / 1000} s.`))
    }, longestMs)
    let made: T | undefined
    worker.once('message', (message: T) => {
      made = message
    })
    worker.once('error', reject)
    worker.once('exit', (code) => {
      clearTimeout(timer)
      if (code !== 0 || made === undefined) reject(new Error(`The picture worker ended with ${code}.`))
      else resolve(made)
    })
  })
}
