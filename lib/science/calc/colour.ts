import { colour } from '../colour'
import { examples } from './examples'
import { fieldsOf, number, object, type Fields } from './read'
import { topic } from './topic'

export const colourTopic = topic({
  name: 'colour',
  says: 'Colour difference CIEDE2000 and ΔE*ab',
  input: '{reference:{L,a,b}, sample:{L,a,b}}',
  output: '{deltaE00, deltaE76}',
  notes: 'Both differences are 0 only for equal colours; the order of the two does not matter.',
  example: examples.colour,
  read: (raw) => {
    const fields = fieldsOf(raw, '', ['reference', 'sample'])
    return { reference: lab(fields, 'reference'), sample: lab(fields, 'sample') }
  },
  compute: colour,
})

function lab(fields: Fields, key: string) {
  const inner = object(fields, key, ['L', 'a', 'b'])
  return { L: number(inner, 'L'), a: number(inner, 'a'), b: number(inner, 'b') }
}
