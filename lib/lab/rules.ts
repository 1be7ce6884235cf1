/** Of every invented person of the demo, so that signing can be tried; shown only while the demo is on. */
export const demoPassword = 'jars stand still here'
