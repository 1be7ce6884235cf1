import { lazy } from 'react'

// What the Bench does not show at first comes as soon as nothing else is to be done, so that the day stands at once and
// the network may go.

const jarScreen = () => import('@/components/bench/jar-screen')
const byInstrument = () => import('@/components/bench/by-instrument')
const findJar = () => import('@/components/bench/find-jar')

export const JarScreen = lazy(async () => ({ default: (await jarScreen()).JarScreen }))
export const ByInstrument = lazy(async () => ({ default: (await byInstrument()).ByInstrument }))
export const FindJar = lazy(async () => ({ default: (await findJar()).FindJar }))

export const loadAhead = () => Promise.all([jarScreen(), byInstrument(), findJar()])
