import { lazy } from 'react'
import { loadPhotoTools } from '@/components/photo/later'
import { whenReached } from '@/components/ui/load-ahead'

// What the Bench does not show at first comes as soon as nothing else is to be done, so that the day stands at once and
// the network may go.

const jarScreen = () => import('@/components/bench/jar-screen')
const byInstrument = () => import('@/components/bench/by-instrument')
const findJar = () => import('@/components/bench/find-jar')
const labelCamera = () => import('@/components/bench/label-camera')

export const JarScreen = lazy(async () => ({ default: (await whenReached(jarScreen)).JarScreen }))
export const ByInstrument = lazy(async () => ({ default: (await whenReached(byInstrument)).ByInstrument }))
export const FindJar = lazy(async () => ({ default: (await whenReached(findJar)).FindJar }))
export const LabelCamera = lazy(() => whenReached(labelCamera))

export const loadAhead = () =>
  Promise.all([jarScreen(), byInstrument(), findJar(), labelCamera(), loadPhotoTools()])
