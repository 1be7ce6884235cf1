import type simulated from '@/lib/science/simulated.json'

type Figures = (typeof simulated)['figures']
export type TrustLine = { what: string; count: string; means: string }

const line = (what: string, percent: number, means: string): TrustLine => ({
  what,
  count: percent.toFixed(percent < 1 || (percent > 99 && percent < 100) ? 1 : 0),
  means,
})

/** What the simulation found, told as one would to a colleague. */
export const trustLines = {
  seen: (f: Figures): TrustLine[] => [
    line(
      'everything changes slowly and harmlessly, in a line: flagged',
      f.harmlessLinear,
      'at most a fifth of the band is ever used at 45 °C',
    ),
    line(
      'everything settles in the first weeks and then stands: flagged',
      f.harmlessSettling,
      'a settling start looks like a drift; ask whether it goes on',
    ),
    line('a pH that drifts in a line: leaning four weeks ahead', f.phLinear, 'pH is the surest of the three'),
    line(
      'a viscosity that drifts in a line: leaning four weeks ahead',
      f.viscosityLinear,
      'its band is few scatters wide, so it is seen latest',
    ),
    line(
      'a viscosity that drifts fast, then slower: leaning four weeks ahead',
      f.viscosityFirstOrder,
      'what moves early is seen early',
    ),
    line(
      'separation that grows from the start: leaning four weeks ahead',
      f.separationLinear,
      'true only where it grows from the start',
    ),
    line(
      'separation after a lag: flagged as begun before it is out, where a pull falls between',
      f.onsetBeforeOut,
      `${f.pullsBetween.toFixed(1)} pulls lie between on average: no rule can warn ahead of a lag, only jars looked at often`,
    ),
    line(
      'a decimal point slips: doubted while it is typed',
      f.slipsDoubted,
      `pH ${f.slipsDoubtedPh.toFixed(0)}, viscosity ${f.slipsDoubtedViscosity.toFixed(0)}; a small layer may slip unseen`,
    ),
    line(
      'a steady day: the instrument wrongly named',
      f.steadyDaysNamed,
      'that day’s readings are then taken again',
    ),
    line(
      'separation faster than a point a week: its start told to the week',
      f.onsetTold,
      `slower than that ${f.slowOnsetTold.toFixed(0)}`,
    ),
    line(
      'the 95 % bound of a shelf life lies on the safe side of the truth',
      f.coverage,
      'where the line is straight and errors are independent',
    ),
  ],
  blurred: (f: Figures): TrustLine[] => [
    line(
      'a cream of high internal phase in a jar filled 45 mm high: flagged',
      f.packedSteadyFlagged,
      'pH scatters by 0.10, viscosity by 8 %, and a millimetre is 2.2 points: take replicates, fill higher, or allow more',
    ),
    line('of these by pH', f['packedSteadyFlagged ph'], 'a band of 0.5 each way is five scatters'),
    line(
      'of these by viscosity',
      f['packedSteadyFlagged viscosity'],
      'a band of 25 % each way is three scatters',
    ),
    line(
      'of these by separation',
      f['packedSteadyFlagged separation'],
      'a limit of 5 % is hardly two millimetres; what counts is whether a layer is there at all',
    ),
    line(
      'pH within 0.3, viscosity within 15 %, separation at most 2 %: flagged',
      f.narrowSteadyFlagged,
      'with the scatter of a lotion; a band wants six scatters each way',
    ),
    line('of these by viscosity', f['narrowSteadyFlagged viscosity'], 'four scatters each way'),
    line('of these by separation', f['narrowSteadyFlagged separation'], 'four scatters, on one side'),
  ],
  tried: [
    'A study reads pH, viscosity (two replicates) and separation every week at 5, 25, 40 and 45 °C and in freeze-thaw. A change runs at 45 °C 1.4 times, at 25 °C 0.35 times and at 5 °C 0.1 times as fast as at 40 °C.',
    'The bands are 0.5 pH units, 25 % of the viscosity and 5 % of fill height. One reading scatters by 0.03 pH, 4 % and 0.5 points (from memory, to be confirmed with your own methods).',
    'Each instrument is off by half of that from day to day, and what it is off by lasts for weeks; the initial is no better than any other reading.',
    'Three pulls of a hundred are missed. One value in two hundred is a blunder: a slipped decimal point or two digits swapped. A doubt is answered by a repeat on the same day, as on the Bench.',
    'Your lab’s scatter decides. Where it is larger than here, these odds are too kind.',
  ],
}
