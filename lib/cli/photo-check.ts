import { atMost, plain, tableOf, type Figure } from './bench/figure'
import { costOfPreview, costOfProposal } from './photo-check/cost'
import { judge, type Judged } from './photo-check/judge'
import { percentOf } from '@/lib/science/percent'

// `npm run photo-check`: draws photos of jars with known layers, lets them be measured, prints figures beside targets,
// exits 1 on a miss. `-- --photos 100` takes fewer, `-- --from 1000` others, `-- --tell` names each that is off.

const near = 1.5
const firstSeed = 5000

async function main(): Promise<void> {
  const photos = numberOf('--photos') ?? 400
  const from = firstSeed + (numberOf('--from') ?? 0)
  const costs = await costFigures()
  const judged = Array.from({ length: photos }, (_, i) => judge(from + i, 800))
  const figures = [...accuracyFigures(judged), ...costs]
  console.log(tableOf(figures))
  if (process.argv.includes('--tell'))
    for (const one of judged.filter(isOff)) console.log(JSON.stringify(one))
  if (figures.some((figure) => figure.isMet === false)) process.exitCode = 1
}

const isNear = ({ worst }: Judged) => worst !== null && worst <= near
const isOff = (one: Judged) => (one.isOpaque ? one.sureness !== 'shows nothing' : !isNear(one))

function accuracyFigures(judged: Judged[]): Figure[] {
  const opaque = judged.filter((one) => one.isOpaque)
  const clear = judged.filter((one) => !one.isOpaque)
  const off = clear.filter((one) => !isNear(one))
  const sure = clear.filter((one) => one.sureness === 'sure')
  return [
    plain('photos of jars that show their layers', `${clear.length}`),
    atLeast(
      `all four lines within ${near} points of fill height`,
      clear.filter(isNear).length,
      clear.length,
      90,
    ),
    atLeast(
      'of the others, said not to be sure',
      off.filter((one) => one.sureness !== 'sure').length,
      off.length,
      80,
    ),
    plain('said to be sure', share(sure.length, clear.length)),
    plain('of these, within', share(sure.filter(isNear).length, sure.length)),
    plain('photos of opaque jars', `${opaque.length}`),
    atLeast(
      'said to show nothing',
      opaque.filter((one) => one.sureness === 'shows nothing').length,
      opaque.length,
      90,
    ),
  ]
}

async function costFigures(): Promise<Figure[]> {
  const seconds = (value: number) => `${value.toFixed(2)} s`
  const megabytes = (value: number) => `${Math.round(value)} MB`
  const preview = await costOfPreview()
  const proposal = await costOfProposal()
  return [
    atMost('a proposal, of a copy of 2,000 px', proposal.seconds, 1.5, seconds),
    atMost('memory more, meanwhile', proposal.moreMegabytes, 150, megabytes),
    atMost('a preview, of 12 megapixels', preview.seconds, 4, seconds),
    atMost('memory of the whole process, meanwhile', preview.megabytes, 600, megabytes),
  ]
}

function atLeast(what: string, count: number, of: number, target: number): Figure {
  const isMet = of === 0 || percentOf(count, of) >= target
  return { what, found: share(count, of), target: `at least ${target} %`, isMet }
}

function share(count: number, of: number): string {
  return of === 0 ? 'none' : `${percentOf(count, of).toFixed(1)} %`
}

function numberOf(name: string): number | null {
  const at = process.argv.indexOf(name)
  return at === -1 ? null : Number(process.argv[at + 1])
}

await main()
