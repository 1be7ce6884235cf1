import { driftTopic, instrumentDayTopic } from './drift'
import { centrifugeTopic, dropletsTopic, jarPlanTopic, phaseFractionTopic, settlingTopic } from './emulsion'
import { acceleratedAgeTopic, arrheniusTopic, mktTopic } from './heat'
import {
  bufferPhTopic,
  colourTopic,
  phSlopeTopic,
  separationCurveTopic,
  separationTopic,
  viscosityTopic,
} from './measures'
import { extrapolationCapTopic, outlierTopic, regressionTopic, shelfLifeTopic } from './statistics'
import type { Topic } from './topic'

export const topics: readonly Topic[] = [
  regressionTopic,
  shelfLifeTopic,
  extrapolationCapTopic,
  mktTopic,
  arrheniusTopic,
  acceleratedAgeTopic,
  viscosityTopic,
  phSlopeTopic,
  bufferPhTopic,
  separationTopic,
  separationCurveTopic,
  colourTopic,
  phaseFractionTopic,
  dropletsTopic,
  centrifugeTopic,
  settlingTopic,
  outlierTopic,
  driftTopic,
  instrumentDayTopic,
  jarPlanTopic,
]
