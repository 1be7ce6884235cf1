import { lazy } from 'react'
import { whenReached } from '@/components/ui/load-ahead'

// What takes and opens photos comes after the Bench stands (`loadAhead`), so that it is there when the network is not.

const camera = () => import('./camera')
const measure = () => import('./measure')
const colour = () => import('./colour-on-photo')
const drops = () => import('./drops-on-photo')

export const Camera = lazy(() => whenReached(camera))
export const Measure = lazy(() => whenReached(measure))
export const ColourOnPhoto = lazy(() => whenReached(colour))
export const DropsOnPhoto = lazy(() => whenReached(drops))

export const loadPhotoTools = () => Promise.all([camera(), measure(), colour(), drops()])
