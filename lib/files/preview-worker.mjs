// Decodes apart from the server's own thread: a photo holds its whole bitmap while it is made small.
import { parentPort, workerData } from 'node:worker_threads'
import { Jimp } from 'jimp'

const { bytes, width } = workerData
const image = await Jimp.fromBuffer(Buffer.from(bytes), { 'image/jpeg': { maxMemoryUsageInMB: 1024 } })
if (image.width > width) image.resize({ w: width })
const made = await image.getBuffer('image/jpeg', { quality: 82 })
parentPort.postMessage(new Uint8Array(made))
