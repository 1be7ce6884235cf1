import type { Recipe } from './journey'

// Invented formulas with generic INCI names; densities are typical ones, from memory.

type Row = [phase: string, inciName: string, does: string, share: string, density: string]

const lines = (rows: Row[]): Recipe['lines'] =>
  rows.map(([phase, inciName, does, share, density]) => ({
    phase,
    inciName,
    function: does,
    share,
    density,
  }))

/** Gelled water, added slowly under low shear to the oil, all of it cold. */
const coldSteps: Recipe['steps'] = [
  step('A', 'Stir the oil phase until it is even.', '300', '10'),
  step('B', 'Sprinkle the gum into the water, add the rest, let it swell until clear.', '400', '30'),
  step('B into A', 'Add the gelled water in a thin stream under low shear.', '300', '40'),
]

/** By hand: 82.12 mL of water phase in 99.21 mL. */
export const siliconeCream: Recipe = {
  code: 'SI83',
  name: 'silicone cream',
  emulsionType: 'water-in-silicone',
  lines: lines([
    ['A', 'PEG-10 Dimethicone', 'polymeric emulsifier', '3,00', '1,00'],
    ['A', 'Dimethicone', 'silicone', '8,00', '0,96'],
    ['A', 'Cyclopentasiloxane', 'silicone', '5,00', '0,95'],
    ['A', 'Dimethicone Crosspolymer', 'thickens the oil', '0,50', '1,00'],
    ['B', 'Aqua', 'water', 'qs', '0,998'],
    ['B', 'Glycerin', 'humectant', '5,00', '1,261'],
    ['B', 'Magnesium Sulfate', 'electrolyte', '0,80', '1,68'],
    ['B', 'Hydroxyethylcellulose', 'gels the water', '0,30', '1,50'],
    ['B', 'Phenoxyethanol', 'preservative', '0,80', '1,11'],
  ]),
  internalPhase: 'B',
  steps: coldSteps,
}

/** By hand: 86.67 mL of water phase in 99.46 mL. */
export const siliconeFreeCream: Recipe = {
  code: 'W88',
  name: 'silicone-free cream',
  emulsionType: 'water-in-oil',
  lines: lines([
    ['A', 'PEG-30 Dipolyhydroxystearate', 'polymeric emulsifier', '3', '0.94'],
    ['A', 'Caprylic/Capric Triglyceride', 'oil', '5.5', '0.945'],
    ['A', 'Isoamyl Laurate', 'light oil', '3', '0.86'],
    ['A', 'Disteardimonium Hectorite', 'thickens the oil', '0.5', '1.7'],
    ['B', 'Aqua', 'water', 'qs', '0.998'],
    ['B', 'Glycerin', 'humectant', '5', '1.261'],
    ['B', 'Magnesium Sulfate', 'electrolyte', '0.7', '1.68'],
    ['B', 'Xanthan Gum', 'gels the water', '0.3', '1.5'],
    ['B', 'Phenoxyethanol', 'preservative', '0.8', '1.11'],
  ]),
  internalPhase: 'B',
  steps: coldSteps,
}

/** By hand: 13.12 mL of oil in 100.26 mL. */
export const lotion: Recipe = {
  code: 'L12',
  name: 'plain lotion',
  emulsionType: 'oil-in-water',
  lines: lines([
    ['A', 'Caprylic/Capric Triglyceride', 'oil', '8', '0.945'],
    ['A', 'Isoamyl Laurate', 'light oil', '4', '0.86'],
    ['B', 'Aqua', 'water', 'qs', '0.998'],
    ['B', 'Polyglyceryl-10 Laurate', 'emulsifier', '2', '1.1'],
    ['B', 'Glycerin', 'humectant', '3', '1.261'],
    ['B', 'Xanthan Gum', 'gels the water', '0.4', '1.5'],
    ['B', 'Phenoxyethanol', 'preservative', '0.9', '1.11'],
  ]),
  internalPhase: 'A',
  steps: [
    step('B', 'Let the gum swell, then dissolve the rest.', '400', '30'),
    step('A into B', 'Add the oil under the stirrer.', '800', '10'),
  ],
}

/** The base of a family: gum and salt are varied. */
export const gelledCream: Recipe = {
  code: 'G80',
  name: 'gelled cream',
  emulsionType: 'water-in-oil',
  lines: lines([
    ['A', 'PEG-30 Dipolyhydroxystearate', 'polymeric emulsifier', '3', '0.94'],
    ['A', 'Squalane', 'oil', '12', '0.81'],
    ['B', 'Aqua', 'water', 'qs', '0.998'],
    ['B', 'Magnesium Sulfate', 'electrolyte', '0.7', '1.68'],
    ['B', 'Xanthan Gum', 'gels the water', '0.2', '1.5'],
    ['B', 'Phenoxyethanol', 'preservative', '0.8', '1.11'],
  ]),
  internalPhase: 'B',
  steps: coldSteps,
}

function step(phase: string, instruction: string, rpm: string, minutes: string): Recipe['steps'][number] {
  return { phase, instruction, rpm, minutes, temperature: '25' }
}
