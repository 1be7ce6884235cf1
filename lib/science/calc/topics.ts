import type { Topic } from './topic'

/** Topics by name, each loaded when asked for: most need none of the numeric packages, and `calc` starts at once. */
const loaders: Record<string, () => Promise<Topic>> = {
  regression: async () => (await import('./statistics')).regressionTopic,
  'shelf-life': async () => (await import('./statistics')).shelfLifeTopic,
  'extrapolation-cap': async () => (await import('./statistics')).extrapolationCapTopic,
  mkt: async () => (await import('./heat')).mktTopic,
  arrhenius: async () => (await import('./heat')).arrheniusTopic,
  'accelerated-age': async () => (await import('./heat')).acceleratedAgeTopic,
  viscosity: async () => (await import('./measures')).viscosityTopic,
  'ph-slope': async () => (await import('./measures')).phSlopeTopic,
  'buffer-ph': async () => (await import('./measures')).bufferPhTopic,
  separation: async () => (await import('./measures')).separationTopic,
  'separation-curve': async () => (await import('./separation-curve')).separationCurveTopic,
  colour: async () => (await import('./colour')).colourTopic,
  'phase-fraction': async () => (await import('./emulsion')).phaseFractionTopic,
  droplets: async () => (await import('./emulsion')).dropletsTopic,
  centrifuge: async () => (await import('./emulsion')).centrifugeTopic,
  settling: async () => (await import('./emulsion')).settlingTopic,
  outlier: async () => (await import('./statistics')).outlierTopic,
  drift: async () => (await import('./drift')).driftTopic,
  'instrument-day': async () => (await import('./drift')).instrumentDayTopic,
  'jar-plan': async () => (await import('./emulsion')).jarPlanTopic,
}

export const topicNames: readonly string[] = Object.keys(loaders)

export async function findTopic(name: string): Promise<Topic | null> {
  return Object.hasOwn(loaders, name) ? loaders[name]!() : null
}

export function allTopics(): Promise<Topic[]> {
  return Promise.all(Object.values(loaders).map((load) => load()))
}
