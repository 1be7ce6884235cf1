import { tableOf, type Figure } from './bench/figure'

// `npm run bench NAME`: measures, prints figures beside their targets, exits 1 on a miss.

const benches: Record<string, { says: string; load: () => Promise<() => Figure[] | Promise<Figure[]>> }> = {
  formula: {
    says: 'a keystroke in a formula of 200 lines, a pasted block read',
    load: async () => (await import('./bench/formula')).benchFormula,
  },
  lists: {
    says: 'pages and search of lists with a hundred thousand rows',
    load: async () => (await import('./bench/lists')).benchLists,
  },
  science: {
    says: 'regression against R, a large study recomputed, memory, the start of calc',
    load: async () => (await import('./bench/science')).benchScience,
  },
}

async function main(name: string | undefined): Promise<void> {
  const chosen = name !== undefined && Object.hasOwn(benches, name) ? benches[name] : undefined
  if (chosen === undefined) {
    const list = Object.entries(benches).map(([key, { says }]) => `  ${key}  ${says}`)
    console.log(['npm run bench NAME measures and compares with targets:', '', ...list].join('\n'))
    if (name !== undefined) process.exitCode = 2
    return
  }
  const figures = await (await chosen.load())()
  console.log(tableOf(figures))
  if (figures.some((figure) => figure.isMet === false)) process.exitCode = 1
}

await main(process.argv[2])
