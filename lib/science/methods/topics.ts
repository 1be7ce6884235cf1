import { driftMethod, instrumentDayMethod } from './drift'
import {
  centrifugeMethod,
  dropletsMethod,
  jarPlanMethod,
  phaseFractionMethod,
  settlingMethod,
} from './emulsion'
import { acceleratedAgeMethod, arrheniusMethod, mktMethod } from './heat'
import {
  bufferPhMethod,
  colourMethod,
  phSlopeMethod,
  separationCurveMethod,
  separationMethod,
  viscosityMethod,
} from './measures'
import type { Method } from './method'
import { extrapolationCapMethod, outlierMethod, regressionMethod, shelfLifeMethod } from './statistics'

/** What each topic of `calc` computes; a test finds none missing. */
export const topicMethods: Record<string, Method> = {
  regression: regressionMethod,
  'shelf-life': shelfLifeMethod,
  'extrapolation-cap': extrapolationCapMethod,
  mkt: mktMethod,
  arrhenius: arrheniusMethod,
  'accelerated-age': acceleratedAgeMethod,
  viscosity: viscosityMethod,
  'ph-slope': phSlopeMethod,
  'buffer-ph': bufferPhMethod,
  separation: separationMethod,
  'separation-curve': separationCurveMethod,
  colour: colourMethod,
  'phase-fraction': phaseFractionMethod,
  droplets: dropletsMethod,
  centrifuge: centrifugeMethod,
  settling: settlingMethod,
  outlier: outlierMethod,
  drift: driftMethod,
  'instrument-day': instrumentDayMethod,
  'jar-plan': jarPlanMethod,
}
