import { hash, verify } from '@node-rs/argon2'
import { longestPassword, shortestPassword } from '@/lib/person/rules'
import { commonPasswords } from './common-passwords'

// OWASP's first choice for argon2id: 19 MiB, two passes, one lane.
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

export function hashPassword(password: string): Promise<string> {
  return hash(password.normalize('NFKC'), cost)
}

/** Without a hash it works just as long, so that time does not tell which addresses exist. */
export async function verifyPassword(stored: string | undefined, password: string): Promise<boolean> {
  const isRight = await verify(stored ?? (await decoy()), password.normalize('NFKC')).catch(() => false)
  return stored !== undefined && isRight
}

let decoyHash: Promise<string> | undefined
function decoy(): Promise<string> {
  decoyHash ??= hashPassword('nobody has this password')
  return decoyHash
}

/** The sentence that says why not, or null. No composition is forced and nothing expires. */
export function judgePassword(password: string, about: { email: string; name: string }): string | null {
  const length = [...password].length
  if (length < shortestPassword)
    return `The password has ${length} characters. Use ${shortestPassword} or more; several words make a good one.`
  if (length > longestPassword)
    return `The password has ${length} characters. Use at most ${longestPassword}.`
  const plain = password.normalize('NFKC').toLowerCase()
  if (isCommon(plain)) return 'This password is one of the first that would be tried. Choose another.'
  const own = [about.email, about.email.split('@')[0] ?? '', about.name].map((word) => word.toLowerCase())
  if (own.some((word) => word.length > 3 && plain.replaceAll(word, '').length < 6))
    return 'This password is little more than your own name or address. Choose another.'
  return null
}

// Common words get no better by being repeated, spaced, or numbered at the end.
function isCommon(plain: string): boolean {
  if (new Set(plain).size < 4) return true
  const bare = plain.replace(/[\s._-]/g, '')
  const stripped = bare.replace(/[\d!?.*#$]+$/, '')
  const half = bare.slice(0, bare.length / 2)
  return [plain, bare, stripped, half.repeat(2) === bare ? half : bare].some((form) =>
    commonPasswords.has(form),
  )
}
