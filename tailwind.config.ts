import type { Config } from 'tailwindcss'

// The tokens live as CSS variables in app/globals.css; these are their names as Tailwind colours, and
// there is no other colour: the framework's own palette is replaced.
const tokens = [
  'ground',
  'recess',
  'paper',
  'typed',
  'cream',
  'ink',
  'onink',
  'soft',
  'rule',
  'hair',
  'alarm',
  'wash',
  'water',
  'oil',
  'oilline',
  'dot',
]

const weights = [220, 300, 430, 560, 600, 640, 650, 700, 720, 750, 800]

// Sizes in px, named by their number: 13, 15, 17, 44 and 50 are the Desk's, 17 and more the Bench's.
const sizes = [13, 14, 15, 16, 17, 18, 19, 20, 22, 24, 26, 30, 36, 44, 48, 50, 64, 76, 116]

const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(tokens.map((token) => [token, `var(--${token})`])),
    },
    extend: {
      fontFamily: {
        sans: ['var(--font-text-more)', 'var(--font-text)', 'sans-serif'],
        mono: ['var(--font-code-more)', 'var(--font-code)', 'monospace'],
      },
      fontSize: Object.fromEntries(sizes.map((size) => [String(size), `${size / 16}rem`])),
      fontWeight: Object.fromEntries(weights.map((weight) => [String(weight), String(weight)])),
      borderRadius: { DEFAULT: '4px' },
      boxShadow: { float: '0 6px 24px rgb(0 0 0 / 0.22)' },
    },
  },
}

export default config
