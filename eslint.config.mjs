import path from 'node:path'
import nextVitals from 'eslint-config-next/core-web-vitals'
import nextTypescript from 'eslint-config-next/typescript'
import { formulas } from './lib/cli/lint/formulas.mjs'

// The walls of the house (DEVELOPERS.md) as lint errors. Each says what to do instead; there is no list of exceptions.

const root = import.meta.dirname
/** Rooms of lib that belong to no noun. */
const rooms = ['auth', 'cli', 'db', 'files', 'http', 'jobs', 'mail', 'science']
const closedList = ['schema', 'keys', 'rules', 'queries', 'commands', 'hooks', 'jobs', 'mail', 'document']

const isIn = (file, ...folders) => folders.some((folder) => file.startsWith(`${folder}/`))
/** Whether a file is a noun's queries.ts, or in its folder queries/. */
const isPart = (file, ...parts) =>
  new RegExp(`^lib/(?!(?:${rooms.join('|')})/)[^/]+/(?:${parts.join('|')})(?:[./]|$)`).test(file)
const isPackage = (source, ...names) => names.some((name) => source === name || source.startsWith(`${name}/`))
const touchesDatabase = (target) =>
  (isIn(target, 'lib/db') && target !== 'lib/db/id') || isPackage(target, 'kysely', 'pg', 'pg-boss')

/** What the server's rooms hold that works in the browser as well. */
const browserSafe = [
  ...['lib/auth/actor', 'lib/auth/permissions', 'lib/db/id'],
  ...['lib/http/errors', 'lib/http/fetcher', 'lib/http/zod'],
]

/** Each wall: which files it holds for, which imports it refuses, and what to do instead. */
const walls = [
  {
    holdsFor: (file) => !isIn(file, 'lib/auth', 'tests'),
    refuses: (target) => isPackage(target, 'lucia') || target.startsWith('@lucia-auth/'),
    instead: 'Only lib/auth imports lucia. Take what you need (an Actor, a session) from lib/auth.',
  },
  {
    holdsFor: (file) =>
      !isIn(file, 'lib/db', 'lib/auth', 'lib/http', 'lib/jobs', 'lib/cli', 'migrations', 'tests') &&
      !isPart(file, 'queries', 'commands', 'jobs'),
    refuses: (target, isType) => !isType && touchesDatabase(target),
    instead:
      "Only queries, commands, jobs and lib/{db,auth,http,jobs,cli} touch the database. Move the statement to the noun's queries.ts or commands.ts and call that.",
  },
  {
    holdsFor: (file) => isPart(file, 'schema', 'rules'),
    refuses: (target, isType) =>
      !isType &&
      !isPackage(target, 'zod', 'date-fns', '@date-fns/tz') &&
      !browserSafe.includes(target) &&
      !isIn(target, 'lib/science') &&
      !isPart(target, 'schema', 'rules'),
    instead:
      'schema.ts and rules.ts run in the browser too: beside types they import zod, lib/science, lib/http/errors and other schema or rules only. Pass the rest in as a parameter.',
  },
  {
    holdsFor: (file) => isPart(file, 'keys'),
    refuses: (_target, isType) => !isType,
    instead:
      'keys.ts holds addresses alone, so that a page which asks for one does not load zod with it. Import types only.',
  },
  {
    holdsFor: (file) => isIn(file, 'components'),
    refuses: (target, isType) =>
      !isType && (isPart(target, 'queries', 'commands', 'jobs', 'mail', 'document') || isServerRoom(target)),
    instead:
      'Components run in the browser: take `import type` from queries, values from schema, keys, rules, hooks, lib/science or lib/http/fetcher; the page passes rows in as props.',
  },
  {
    holdsFor: (file) => isIn(file, 'components'),
    refuses: (target, isType) => isType && isPart(target, 'commands', 'jobs', 'mail', 'document'),
    instead: 'Components take types from queries and schema only. Move the type to schema.ts.',
  },
  {
    holdsFor: (file) => isIn(file, 'components/charts', 'components/marks'),
    refuses: (target) => isPackage(target, 'swr') || target === 'lib/http/fetcher' || isPart(target, 'hooks'),
    instead: "Charts and marks draw plain arrays. Fetch in the noun's component and pass the rows in.",
  },
  {
    holdsFor: (file) => isIn(file, 'lib/science'),
    refuses: (target) => /^(app|components|lib|migrations)\//.test(target) && !isIn(target, 'lib/science'),
    instead: 'lib/science imports nothing of the project outside itself. Pass it in as a parameter.',
  },
  {
    holdsFor: (file) => isIn(file, 'lib/science'),
    refuses: (target) => target.startsWith('node:') || isPackage(target, 'react', 'next', 'zod'),
    instead:
      'lib/science has no input, output, clock or randomness. Do that in the caller and pass numbers in.',
  },
  {
    holdsFor: (file) => isIn(file, 'migrations'),
    refuses: (target) => /^(app|components|lib)\//.test(target),
    instead: 'A migration is frozen, so it imports no code that changes. Write the statement out in it.',
  },
  {
    holdsFor: (file) => isIn(file, 'app') && /\/(page|layout)\.tsx$/.test(file),
    refuses: (target, isType) => !isType && isPart(target, 'commands'),
    instead: 'A page reads. Let the form send to a route under app/api, which calls the command.',
  },
  {
    holdsFor: (file) => isIn(file, 'app', 'components', 'lib', 'migrations') && !isIn(file, 'lib/cli'),
    refuses: (target) => isIn(target, 'lib/cli', 'tests'),
    instead: 'lib/cli and tests stand on top of the house. Move what is shared to the room that owns it.',
  },
  {
    holdsFor: () => true,
    refuses: (target) => isPackage(target, 'sharp', 'multer'),
    instead: 'sharp and multer are out by decision: jimp makes previews, formidable takes uploads.',
  },
]

function isServerRoom(target) {
  const isRoom =
    isIn(target, 'lib/auth', 'lib/http', 'lib/db', 'lib/files', 'lib/jobs', 'lib/mail') ||
    target === 'lib/env'
  return (isRoom && !browserSafe.includes(target)) || target.startsWith('node:') || touchesDatabase(target)
}

/** The file or package that an import names, seen from the top of the project. */
function resolve(source, file) {
  const fromTop = source.startsWith('@/')
    ? source.slice(2)
    : source.startsWith('.')
      ? path.posix.join(path.posix.dirname(file), source)
      : source
  return fromTop.replace(/\.(ts|tsx|mjs)$/, '')
}

const boundaries = {
  meta: { type: 'problem', schema: [] },
  create(context) {
    const file = path.relative(root, context.filename).split(path.sep).join('/')
    const check = (node) => {
      if (!node.source || typeof node.source.value !== 'string') return
      const target = resolve(node.source.value, file)
      for (const wall of walls) {
        if (!wall.holdsFor(file) || !wall.refuses(target, isTypeOnly(node))) continue
        context.report({ node: node.source, message: wall.instead })
      }
    }
    return {
      Program: (node) => checkName(file, (message) => context.report({ node, message })),
      ImportDeclaration: check,
      ImportExpression: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: (node) => {
        check(node)
        // A package handed on, set up as we want it, gathers nothing of ours.
        if (/^(\.|@\/)/.test(node.source.value))
          context.report({ node, message: 'No barrels: import from the file that has it.' })
      },
    }
  },
}

function isTypeOnly(node) {
  if (node.importKind === 'type' || node.exportKind === 'type') return true
  const names = node.specifiers ?? []
  return names.length > 0 && names.every((name) => (name.importKind ?? name.exportKind) === 'type')
}

function checkName(file, report) {
  const parts = file.replace(/\.[^/]*$/, '').split('/')
  const name = parts.at(-1) ?? ''
  if (name === 'index') report('No barrels: give the file the name of what it holds.')
  if (parts.some((part) => /^(utils?|helpers?|services?|common|misc)$/.test(part)))
    report('A name like this collects everything: name the file after the concept it holds.')
  if (!isIn(file, 'app', '.ci') && parts.slice(1).some((part) => !/^[a-z0-9._-]+$/.test(part)))
    report('File names are kebab-case.')
  const [top, noun, part] = parts
  if (top === 'lib' && part && !rooms.includes(noun ?? '') && !closedList.includes(part))
    report(
      `A noun's folder holds ${closedList.join(', ')} only. Put this into one of them, or a folder of its name.`,
    )
}

const config = [
  { ignores: ['.next/', '.data/', 'node_modules/', 'next-env.d.ts', 'test-results/', 'playwright-report/'] },
  ...nextVitals,
  ...nextTypescript,
  {
    plugins: { stillstand: { rules: { boundaries, formulas } } },
    rules: {
      'stillstand/boundaries': 'error',
      'stillstand/formulas': 'error',
      // Queries take the actor second even where nothing depends on who asks.
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', destructuredArrayIgnorePattern: '^_' },
      ],
      // Signing in and out load the page anew on purpose: nothing of the earlier person stays in memory.
      '@next/next/no-location-assign-relative-destination': 'off',
      'import/no-anonymous-default-export': 'off',
    },
  },
  {
    files: ['**/*.mjs'],
    rules: { 'no-undef': 'error' },
    languageOptions: {
      globals: {
        ...Object.fromEntries(
          ['process', 'console', 'fetch', 'performance', 'setTimeout', 'setInterval', 'clearInterval'].map(
            (name) => [name, 'readonly'],
          ),
        ),
        ...{ AbortSignal: 'readonly', URL: 'readonly', Buffer: 'readonly', clearTimeout: 'readonly' },
      },
    },
  },
  {
    // Kysely's type for a schema that the migration itself is changing.
    files: ['migrations/**'],
    rules: { '@typescript-eslint/no-explicit-any': 'off' },
  },
]

export default config
