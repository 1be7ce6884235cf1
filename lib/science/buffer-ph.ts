import { assertFinite, ScienceError } from './guard'

export type Buffer = 'phthalate' | 'phosphate' | 'borax'

const stepC = 5

/**
 * pH of the standard buffers at 0, 5 … 60 °C [std]: phthalate 0.05 mol/kg (IUPAC 2002; attribution from memory),
 * phosphate 0.025 + 0.025 and borax 0.01 mol/kg (NBS: Bates 1962; Durst, SP 260-53; phosphate at 55 °C and borax at
 * 50 °C uncertain by 0.001). Bought buffers carry the table of their own certificate instead.
 */
export const bufferTables: Record<Buffer, readonly number[]> = {
  phthalate: [4.0, 3.998, 3.997, 3.998, 4.001, 4.005, 4.011, 4.018, 4.027, 4.038, 4.05, 4.064, 4.08],
  phosphate: [6.984, 6.951, 6.923, 6.9, 6.881, 6.865, 6.853, 6.844, 6.838, 6.834, 6.833, 6.834, 6.836],
  borax: [9.464, 9.395, 9.332, 9.276, 9.225, 9.18, 9.139, 9.102, 9.068, 9.038, 9.011, 8.985, 8.962],
}

/** Linear between tabulated temperatures, 0 to 60 °C only. */
export function bufferPh({ buffer, temperatureC }: { buffer: Buffer; temperatureC: number }): { ph: number } {
  assertFinite('temperatureC', temperatureC)
  if (temperatureC < 0 || temperatureC > 60) {
    throw new ScienceError(
      'temperatureC',
      `must lie from 0 to 60 °C, where the table ends, not ${temperatureC}`,
    )
  }
  const table = bufferTables[buffer]
  const index = Math.min(Math.floor(temperatureC / stepC), table.length - 2)
  const share = temperatureC / stepC - index
  return { ph: (1 - share) * table[index]! + share * table[index + 1]! }
}
