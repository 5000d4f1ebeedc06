import { gasConstant } from './gasConstant.ts'
import { kelvin } from './kelvin.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/** Volume of one mole of an ideal gas, L/mol: R·T/p. */
export function molarVolumeL(temperatureC: number, pressureKpa = standardPressureKpa): number {
  return (gasConstant * kelvin(temperatureC)) / pressureKpa
}
