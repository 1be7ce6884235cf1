import { assertComputable } from '../guard'

/** A calculation that `calc` offers: how its input is read, what it answers, and how its help explains it. */
export type Topic = {
  name: string
  says: string
  input: string
  output: string
  notes: string
  example: { input: unknown; output: unknown }
  run: (raw: unknown) => unknown
}

type Declared<I, O> = Omit<Topic, 'run'> & { read: (raw: unknown) => I; compute: (input: I) => O }

export function topic<I, O>({ read, compute, ...rest }: Declared<I, O>): Topic {
  return { ...rest, run: (raw) => assertComputable('input', compute(read(raw))) }
}
