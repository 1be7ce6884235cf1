import { inflateSync } from 'node:zlib'

/**
 * The text of a PDF as its pages show it, run by run: content streams are inflated and glyphs are taken back to
 * letters by each font's own ToUnicode table (ISO 32000-1, 9.10.3). Enough for what the report is made with.
 */
export function pdfText(bytes: Uint8Array): string[] {
  const objects = objectsOf(Buffer.from(bytes))
  return [...objects.values()]
    .filter(({ head }) => /\/Type \/Page\b/.test(head))
    .map((page) => textOf(page, objects))
}

/** What draws each page, as its operators stand in the file. */
export function pdfContents(bytes: Uint8Array): string[] {
  const objects = objectsOf(Buffer.from(bytes))
  return [...objects.values()]
    .filter(({ head }) => /\/Type \/Page\b/.test(head))
    .map(({ head }) => objects.get(/\/Contents (\d+) 0 R/.exec(head)?.[1] ?? '')?.stream ?? '')
}

type PdfObject = { head: string; stream: string | null }

function objectsOf(file: Buffer): Map<string, PdfObject> {
  const text = file.toString('latin1')
  const found = new Map<string, PdfObject>()
  for (const match of text.matchAll(/(?:^|\n)(\d+) 0 obj\n/g)) {
    const begin = match.index + match[0].length
    const end = text.indexOf('\nendobj', begin)
    const at = text.indexOf('stream\n', begin)
    const hasStream = at !== -1 && at < end
    const head = text.slice(begin, hasStream ? at : end)
    const length = Number(/\/Length (\d+)/.exec(head)?.[1] ?? 0)
    const raw = file.subarray(at + 7, at + 7 + length)
    found.set(match[1]!, {
      head,
      stream: hasStream ? (/FlateDecode/.test(head) ? inflateSync(raw) : raw).toString('latin1') : null,
    })
  }
  return found
}

function textOf(page: PdfObject, objects: Map<string, PdfObject>): string {
  const get = (id: string | undefined) => objects.get(id ?? '') ?? { head: '', stream: null }
  const resources = get(/\/Resources (\d+) 0 R/.exec(page.head)?.[1])
  const fonts = new Map<string, Map<string, string>>()
  const listed = /\/Font <<([^>]*)>>/.exec(resources.head)?.[1] ?? ''
  for (const [, name, id] of listed.matchAll(/\/(\w+) (\d+) 0 R/g))
    fonts.set(name!, lettersOf(get(/\/ToUnicode (\d+) 0 R/.exec(get(id).head)?.[1]).stream ?? ''))
  const content = get(/\/Contents (\d+) 0 R/.exec(page.head)?.[1]).stream ?? ''
  let letters = new Map<string, string>()
  const runs: string[] = []
  for (const [, font, shown] of content.matchAll(/\/(\w+) [\d.]+ Tf|\[([^\]]*)\] TJ/g)) {
    if (font !== undefined) letters = fonts.get(font) ?? new Map()
    else
      runs.push(
        [...shown!.matchAll(/<([0-9a-fA-F]*)>/g)]
          .flatMap(([, hex]) => hex!.match(/.{4}/g) ?? [])
          .map((code) => letters.get(code.toLowerCase()) ?? '')
          .join(''),
      )
  }
  return runs.join('\n')
}

/** Glyph codes to letters, from the ranges of a ToUnicode table. */
function lettersOf(table: string): Map<string, string> {
  const letters = new Map<string, string>()
  for (const [, first, , list] of table.matchAll(/<([0-9a-f]+)> <([0-9a-f]+)> \[([^\]]*)\]/gi))
    [...list!.matchAll(/<([0-9a-f]+)>/gi)].forEach(([, hex], i) =>
      letters.set(
        (parseInt(first!, 16) + i).toString(16).padStart(4, '0'),
        Buffer.from(hex!, 'hex').swap16().toString('utf16le'),
      ),
    )
  return letters
}
