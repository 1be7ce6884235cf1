/** [practice] An emulsion rests this long before its type test and its initial readings. */
export const restHours = { least: 24, most: 72 }

export type Rest = {
  /** Whole hours and minutes until it may be read; null once it may. */
  toWait: string | null
  isOver: boolean
  sentence: string
}

/** Where the rest stands: what waits, what may be read, and what is late. */
export function restOf(restedHours: number): Rest {
  if (restedHours < restHours.least) {
    const minutes = Math.ceil((restHours.least - restedHours) * 60)
    const toWait = `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')} min`
    return {
      toWait,
      isOver: false,
      sentence: `It may be read in ${toWait}. Read earlier, a cream is still changing: say why.`,
    }
  }
  return restedHours <= restHours.most
    ? { toWait: null, isOver: false, sentence: `Rested enough; read it before ${restHours.most} h are over.` }
    : {
        toWait: null,
        isOver: true,
        sentence: `More than ${restHours.most} h have gone by; say so beside what is read.`,
      }
}
