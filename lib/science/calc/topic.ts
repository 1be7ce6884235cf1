import { assertComputable } from '../guard'
import { fields } from './fields'

/** A calculation that `calc` offers: how its input is read, what it answers, and how its help explains it. */
export type Topic = {
  name: keyof typeof fields
  says: string
  input: string
  output: string
  notes: string
  fields: { input: Record<string, string>; output: Record<string, string> }
  example: { input: unknown; output: unknown }
  run: (raw: unknown) => unknown
}

type Declared<I, O> = Omit<Topic, 'run' | 'fields'> & { read: (raw: unknown) => I; compute: (input: I) => O }

export function topic<I, O>({ read, compute, ...rest }: Declared<I, O>): Topic {
  return { ...rest, fields: fields[rest.name], run: (raw) => assertComputable('input', compute(read(raw))) }
}
