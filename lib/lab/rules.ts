/** [practice] A line is weighed right within this much of its target, unless the protocol or the lab sets another. */
export const usualWeighingTolerancePercent = 1

/** Of every invented person of the demo, so that signing can be tried; shown only while the demo is on. */
export const demoPassword = 'jars stand still here'
