import { parentPort, workerData } from 'node:worker_threads'
import { allFigures } from './figures/all'
import { tallyChunk, type Chunk } from './tally'

/** Counts one chunk after another, as they are handed in. */
const { studies } = workerData as { studies: number }
const figures = allFigures(studies)

parentPort?.on('message', (chunk: Chunk) => {
  parentPort?.postMessage({ figure: chunk.figure, tally: tallyChunk(figures, chunk) })
})
