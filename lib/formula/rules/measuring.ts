import type { EmulsionType } from '../schema'

/**
 * What the outside of an emulsion means for how it is measured; the protocol names the method, and methods never
 * compare. Common practice, no source.
 */
export function measuringMethods(type: EmulsionType): { ph: string; viscosity: string } {
  if (type === 'oil-in-water') {
    return {
      ph: 'Water is outside: the electrode can be dipped, and pH is read directly.',
      viscosity: 'A lotion pours under a disc spindle that stands still; a cream wants a T-bar that travels.',
    }
  }
  const outside = type === 'water-in-silicone' ? 'Silicone' : 'Oil'
  return {
    ph: `${outside} is outside: an electrode that is dipped reads nothing. pH is that of an extract with its ratio and minutes, of the broken emulsion, or of the water phase before it goes in.`,
    viscosity:
      'A packed cream is torn where a spindle stands: a T-bar travels down through what is unstirred, always at the same speed and rest.',
  }
}
