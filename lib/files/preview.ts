import path from 'node:path'
import { Worker } from 'node:worker_threads'

const longestMs = 30_000
// From the project's folder and not from this module's address: the bundler moves modules, not this file.
const workerFile = path.join(process.cwd(), 'lib', 'files', 'preview-worker.mjs')

/** A JPEG of this width at most, turned as the camera says. Throws where the picture cannot be decoded. */
export function makePreview(bytes: Uint8Array, width: number): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const worker = new Worker(workerFile, { workerData: { bytes, width } })
    const timer = setTimeout(() => {
      void worker.terminate()
      reject(new Error(`The preview took longer than ${longestMs / 1000} s.`))
    }, longestMs)
    worker.once('message', (made: Uint8Array) => resolve(made))
    worker.once('error', reject)
    worker.once('exit', (code) => {
      clearTimeout(timer)
      if (code !== 0) reject(new Error(`The preview worker ended with ${code}.`))
    })
  })
}
