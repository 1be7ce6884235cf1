import type { JarRow } from '@/lib/jar/queries/jars'
import { labelWords } from '@/lib/label/rules/lines'
import type { Label } from './label-shapes'
import { qrOf } from './qr'

/** One jar's label: its code in the square and for the eye, and the lines beside it. */
export function labelOf(jar: JarRow, ownPack: string | null): Label {
  return { id: jar.id, jarCode: jar.code, ...labelWords(jar, ownPack), qr: qrOf(jar.code) }
}
