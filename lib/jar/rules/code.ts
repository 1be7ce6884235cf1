/**
 * Codes of jars: four characters and one that checks them.
 *
 * The alphabet leaves out whatever a gloved hand or a tired eye confuses (0 O, 1 I L, 5 S, 2 Z, 8 B, 6 G,
 * 9 Q, U V) and the vowels, so that no code reads as a word. It has 23 characters, a prime: with the weights
 * 1 to 5 every single wrong character and every swap of two characters is caught.
 */
const alphabet = '23456789CDFHJKMNPRTVWXY'
const size = alphabet.length
/** 5 × 14 = 70 = 1 (mod 23): the inverse of the check character's own weight. */
const inverseOfFive = 14

export function jarCode(random: () => number): string {
  const picks = Array.from({ length: 4 }, () => Math.min(size - 1, Math.floor(random() * size)))
  const check = ((size - (weighted(picks) % size)) * inverseOfFive) % size
  return [...picks, check].map((pick) => alphabet[pick]).join('')
}

/** Distinct codes; the caller refuses those that are already on a jar. */
export function jarCodes(count: number, random: () => number): string[] {
  const codes = new Set<string>()
  while (codes.size < count) codes.add(jarCode(random))
  return [...codes]
}

export function isJarCode(text: string): boolean {
  if (text.length !== 5) return false
  const places = [...text].map((character) => alphabet.indexOf(character))
  return !places.includes(-1) && weighted(places) % size === 0
}

/**
 * What a scanner or a person gave, as a code: small letters, spaces, dots and hyphens are let pass, and so
 * are the station in front of it ("45·J4PC7") and an address that ends in it. Null where it is no code.
 */
export function readJarCode(text: string): string | null {
  const last = text.trim().toUpperCase().split('/').at(-1) ?? ''
  const behindStation = last.replace(/^(?:[-−]?\d{1,2}|FT)\s*[·.:]\s*/u, '')
  for (const candidate of [last, behindStation]) {
    const bare = candidate.replace(/[\s·.:-]/gu, '')
    if (isJarCode(bare)) return bare
  }
  return null
}

/** As labels and screens say it: the station first, for the walk back to it. */
export function namedJar(
  code: string,
  station: { temperatureC: number | null; isFreezeThaw: boolean } | null,
) {
  if (!station) return code
  if (station.isFreezeThaw) return `FT·${code}`
  return station.temperatureC === null ? code : `${String(station.temperatureC).replace('-', '−')}·${code}`
}

function weighted(places: number[]): number {
  return places.reduce((sum, place, index) => sum + place * (index + 1), 0)
}
