import { readdirSync, readFileSync } from 'node:fs'
import { brotliDecompressSync } from 'node:zlib'
import ts from 'typescript'
import { describe, expect, it } from 'vitest'

const folder = 'node_modules/@fontsource-variable/atkinson-hyperlegible-next/files'
const files = ['latin', 'latin-ext'].map(
  (range) => `${folder}/atkinson-hyperlegible-next-${range}-wght-normal.woff2`,
)

// The second file stands first in the family and is asked only for this range (app/layout.tsx).
const held = new Set(files.flatMap((file) => charactersOf(readFileSync(file))))

/** Terminals (the calculator is one) and the report have fonts of their own. */
const elsewhere = /^lib\/cli\/|^lib\/science\/calc\/|document\.tsx$|^lib\/report\/|^components\/marks\/pdf-/

describe('letters of the font', () => {
  it('reads the font itself: what it holds and what it lacks', () => {
    for (const letter of 'AzÄßéŁş0°·−…×²') expect(held.has(letter.codePointAt(0)!), letter).toBe(true)
    for (const letter of 'Δ≤≥φη∞✓') expect(held.has(letter.codePointAt(0)!), letter).toBe(false)
  })

  it('every text in the sources can be drawn in it', () => {
    const foreign = sourceFiles().flatMap((file) =>
      textsOf(file).flatMap(({ text, line }) =>
        [...text]
          .filter(
            (letter) =>
              letter > '\u001f' &&
              !/\p{Default_Ignorable_Code_Point}/u.test(letter) &&
              !held.has(letter.codePointAt(0)!),
          )
          .map((letter) => `${file}:${line} holds ${letter} (U+${letter.codePointAt(0)!.toString(16)})`),
      ),
    )
    expect(foreign).toEqual([])
  })
})

function sourceFiles(): string[] {
  return ['app', 'components', 'lib'].flatMap((root) =>
    readdirSync(root, { recursive: true, encoding: 'utf8' })
      .filter((name) => /\.tsx?$/.test(name))
      .map((name) => `${root}/${name}`)
      .filter((name) => !elsewhere.test(name)),
  )
}

/** String literals, template texts and the texts between tags; comments and patterns are never shown. */
function textsOf(file: string): { text: string; line: number }[] {
  const written = readFileSync(file, 'utf8')
  // Most files hold nothing foreign, not even in a comment, and no escape: those need no parsing.
  const isPlain = [...new Set(written)].every((letter) => letter < ' ' || held.has(letter.codePointAt(0)!))
  if (isPlain && !written.includes('\\u')) return []
  const source = ts.createSourceFile(file, written, ts.ScriptTarget.Latest, true)
  const texts: { text: string; line: number }[] = []
  const visit = (node: ts.Node): void => {
    const isText =
      ts.isStringLiteralLike(node) ||
      ts.isJsxText(node) ||
      node.kind === ts.SyntaxKind.TemplateHead ||
      node.kind === ts.SyntaxKind.TemplateMiddle ||
      node.kind === ts.SyntaxKind.TemplateTail
    if (isText) {
      const { line } = source.getLineAndCharacterOfPosition(node.getStart())
      texts.push({ text: (node as ts.LiteralLikeNode).text, line: line + 1 })
    }
    ts.forEachChild(node, visit)
  }
  visit(source)
  return texts
}

/**
 * The characters that a WOFF2 font maps to a glyph: its table directory, the one compressed stream, and the
 * `cmap` in it, which WOFF2 leaves as OpenType has it (W3C WOFF 2.0 sections 4 and 5; OpenType `cmap`).
 */
function charactersOf(font: Buffer): number[] {
  const tableCount = font.readUInt16BE(12)
  let at = 48
  let offset = 0
  let cmap = { start: 0, length: 0 }
  const readBase128 = () => {
    let value = 0
    for (;;) {
      const byte = font.readUInt8(at++)
      value = value * 128 + (byte & 0x7f)
      if ((byte & 0x80) === 0) return value
    }
  }
  for (let table = 0; table < tableCount; table++) {
    const flags = font.readUInt8(at++)
    const known = flags & 0x3f
    if (known === 63) at += 4
    const version = flags >> 6
    const original = readBase128()
    // glyf (10) and loca (11) are transformed at version 0, every other table at any version but 0.
    const isTransformed = known === 10 || known === 11 ? version === 0 : version !== 0
    const length = isTransformed ? readBase128() : original
    if (known === 0) cmap = { start: offset, length }
    offset += length
  }
  const stream = brotliDecompressSync(font.subarray(at, at + font.readUInt32BE(20)))
  return charactersOfCmap(stream.subarray(cmap.start, cmap.start + cmap.length))
}

function charactersOfCmap(cmap: Buffer): number[] {
  const characters: number[] = []
  for (let index = 0; index < cmap.readUInt16BE(2); index++) {
    const sub = cmap.subarray(cmap.readUInt32BE(4 + index * 8 + 4))
    const format = sub.readUInt16BE(0)
    if (format === 4) {
      const count = sub.readUInt16BE(6) / 2
      for (let segment = 0; segment < count; segment++) {
        const end = sub.readUInt16BE(14 + segment * 2)
        const start = sub.readUInt16BE(16 + (count + segment) * 2)
        for (let code = start; code <= end && code < 0xffff; code++) characters.push(code)
      }
    } else if (format === 12) {
      for (let group = 0; group < sub.readUInt32BE(12); group++) {
        const start = sub.readUInt32BE(16 + group * 12)
        const end = sub.readUInt32BE(20 + group * 12)
        for (let code = start; code <= end; code++) characters.push(code)
      }
    }
  }
  return characters
}
