import path from 'node:path'
import { Font } from '@react-pdf/renderer'

/** Atkinson for everything; DejaVu only where a typed text holds a sign that Atkinson lacks. */
export const text = ['Atkinson', 'DejaVu']
export const mono = ['Atkinson Mono', 'DejaVu']

let isRegistered = false

export function registerFonts(): void {
  if (isRegistered) return
  const folder = path.join(process.cwd(), 'node_modules')
  const next = (weight: number) =>
    path.join(
      folder,
      '@fontsource/atkinson-hyperlegible-next/files',
      `atkinson-hyperlegible-next-latin-${weight}-normal.woff`,
    )
  const code = (weight: number) =>
    path.join(
      folder,
      '@fontsource/atkinson-hyperlegible-mono/files',
      `atkinson-hyperlegible-mono-latin-${weight}-normal.woff`,
    )
  const dejavu = (name: string) => path.join(folder, 'dejavu-fonts-ttf/ttf', name)
  Font.register({
    family: 'Atkinson',
    fonts: [300, 400, 500, 600, 700, 800].map((weight) => ({ src: next(weight), fontWeight: weight })),
  })
  Font.register({
    family: 'Atkinson Mono',
    fonts: [400, 700].map((weight) => ({ src: code(weight), fontWeight: weight })),
  })
  Font.register({
    family: 'DejaVu',
    fonts: [
      { src: dejavu('DejaVuSans.ttf'), fontWeight: 400 },
      { src: dejavu('DejaVuSans-Bold.ttf'), fontWeight: 700 },
    ],
  })
  // Long INCI names break where they have a hyphen or slash, never with an invented hyphen.
  Font.registerHyphenationCallback((word) => [word])
  isRegistered = true
}
