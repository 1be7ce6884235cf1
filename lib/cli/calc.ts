import { text } from 'node:stream/consumers'
import type { Topic } from '../science/calc/topic'
import { allTopics, findTopic, topicNames } from '../science/calc/topics'
import { ScienceError } from '../science/guard'

/** `npm run --silent calc -- TOPIC < input.json`: recheck any figure outside the application. */
async function main(args: string[]): Promise<void> {
  const [first, ...rest] = args.filter((arg) => arg !== '--help' && arg !== '-h')
  const wantsHelp = args.includes('--help') || args.includes('-h')
  if (first === undefined) {
    if (wantsHelp) return print(overview(await allTopics()))
    return refuse(`topic: is missing; topics are ${topicNames.join(', ')}`)
  }
  const topic = await findTopic(first)
  if (topic === null) return refuse(`topic: there is no "${first}"; topics are ${topicNames.join(', ')}`)
  if (wantsHelp) return print(helpOf(topic))
  if (rest.length > 0)
    return refuse(`topic: one at a time, not also "${rest.join(' ')}"; input comes from stdin`)
  answer(topic, await text(process.stdin))
}

function answer(topic: Topic, input: string): void {
  if (input.trim() === '') return refuse(`input: is empty; see calc ${topic.name} --help`)
  let raw: unknown
  try {
    raw = JSON.parse(input)
  } catch (error) {
    return refuse(`input: is not valid JSON: ${error instanceof Error ? error.message : String(error)}`)
  }
  try {
    print(JSON.stringify(topic.run(raw), null, 2))
  } catch (error) {
    if (error instanceof ScienceError) return refuse(error.message)
    throw error
  }
}

function overview(topics: Topic[]): string {
  const width = Math.max(...topics.map((topic) => topic.name.length))
  return [
    'calc TOPIC < input.json: one JSON object in, one out. Bad input: exit 2 and one line that names the field.',
    'calc TOPIC --help shows fields, units and a worked example.',
    '',
    ...topics.map((topic) => `  ${topic.name.padEnd(width)}  ${topic.says}`),
  ].join('\n')
}

function helpOf(topic: Topic): string {
  return [
    `${topic.name}: ${topic.says}`,
    '',
    `Input:  ${topic.input}`,
    ...listed(topic.fields.input),
    '',
    `Output: ${topic.output}`,
    ...listed(topic.fields.output),
    '',
    topic.notes,
    '',
    'Example input:',
    JSON.stringify(topic.example.input),
    'gives:',
    JSON.stringify(topic.example.output, null, 2),
  ].join('\n')
}

function listed(fields: Record<string, string>): string[] {
  const width = Math.max(...Object.keys(fields).map((name) => name.length))
  return Object.entries(fields).map(([name, says]) => `  ${name.padEnd(width)}  ${says}`)
}

function print(text: string): void {
  process.stdout.write(`${text}\n`)
}

function refuse(line: string): void {
  process.stderr.write(`${line.replace(/[\s\p{Cc}]+/gu, ' ')}\n`)
  process.exitCode = 2
}

void main(process.argv.slice(2))
