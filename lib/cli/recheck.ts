import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { findTopic } from '@/lib/science/calc/topics'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { calculationsOf, figuresOf, isSame, type Rechecked } from '@/lib/shelf-case/rules/recheck'

// npm run --silent recheck -- case.json: takes a case's frozen content, as the case page gives it, through `calc` and
// says of each figure whether it comes out the same in every digit. Exit 0 only if all do, 2 where it is no such file.

const [file, ...rest] = process.argv.slice(2)
if (file === undefined || rest.length > 0 || file === '--help' || file === '-h')
  refuse('Name one file: npm run --silent recheck -- case.json, downloaded from the case’s page.')
else await recheck(file)

async function recheck(name: string): Promise<void> {
  const content = read(name)
  if (content === null) return
  let calculations: Rechecked[]
  let figures: Rechecked[]
  try {
    calculations = await again(content)
    figures = figuresOf(content)
  } catch (error) {
    return refuse(
      `${name} cannot be computed again: ${error instanceof Error ? error.message : String(error)}. Download it once more.`,
    )
  }
  console.log(`Case ${content.case.code}, study ${content.study.code}, ${content.proposal.months} months`)
  console.log(`SHA-256 ${createHash('sha256').update(canonicalJson(content), 'utf8').digest('hex')}`)
  console.log('Compare it with the one in the report: only then are these the figures that were signed.')
  report('Calculations, by calc', calculations)
  report('Figures that follow from them', figures)
  if (![...calculations, ...figures].every(isSame)) process.exitCode = 1
}

function read(name: string): CaseContent | null {
  try {
    const content = JSON.parse(readFileSync(name, 'utf8')) as CaseContent
    if (String(content.format).startsWith('stillstand-case-')) return content
    refuse(`${name} is not the frozen content of a case. Download it from the case’s page.`)
  } catch (error) {
    refuse(`${name} cannot be read: ${error instanceof Error ? error.message : String(error)}.`)
  }
  return null
}

async function again(content: CaseContent): Promise<Rechecked[]> {
  const found: Rechecked[] = []
  for (const { where, topic, input, output } of calculationsOf(content)) {
    const calc = await findTopic(topic)
    if (calc === null) throw new Error(`there is no topic "${topic}"`)
    found.push({ what: `${where}: ${topic}`, stated: output, again: calc.run(input) })
  }
  return found
}

function report(title: string, rechecked: Rechecked[]): void {
  console.log(`\n${title}: ${rechecked.filter(isSame).length} of ${rechecked.length} the same in every digit`)
  for (const one of rechecked) {
    if (isSame(one)) console.log(`  same       ${one.what}`)
    else {
      console.log(`  DIFFERENT  ${one.what}`)
      console.log(`             stated ${JSON.stringify(one.stated)}`)
      console.log(`             again  ${JSON.stringify(one.again)}`)
    }
  }
}

function refuse(sentence: string): void {
  process.stderr.write(`${sentence}\n`)
  process.exitCode = 2
}
