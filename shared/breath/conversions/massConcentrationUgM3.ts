import { molarVolumeL } from './molarVolumeL.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/**
 * Mass concentration in µg/m³ of a mixing ratio in ppb: 10⁻³·ppb·p·M/(R·T), p in Pa.
 * @param molarMassGPerMol such as 17.031 for ammonia
 */
export function massConcentrationUgM3(
  ppb: number,
  molarMassGPerMol: number,
  temperatureC: number,
  pressureKpa = standardPressureKpa,
): number {
  return (ppb * molarMassGPerMol) / molarVolumeL(temperatureC, pressureKpa)
}
