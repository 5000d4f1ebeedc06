import { molarVolumeL } from './molarVolumeL.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/** Mixing ratio in ppb of a mass concentration in µg/m³; the inverse of `massConcentrationUgM3`. */
export function mixingRatioPpb(
  ugM3: number,
  molarMassGPerMol: number,
  temperatureC: number,
  pressureKpa = standardPressureKpa,
): number {
  return (ugM3 * molarVolumeL(temperatureC, pressureKpa)) / molarMassGPerMol
}
