const words = ['none', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten']

/** Six, not 6, where a sentence begins with it; figures from eleven on. */
export function countWord(count: number, atStart = false): string {
  const word = words[count] ?? String(count)
  return atStart ? word.charAt(0).toUpperCase() + word.slice(1) : word
}
