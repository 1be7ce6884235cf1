/** Letters with an edge in the colour of what lies behind them, so that lines do not cross them out. */
export function halo(colour: string) {
  return { paintOrder: 'stroke', stroke: colour, strokeWidth: 4, strokeLinejoin: 'round' } as const
}
