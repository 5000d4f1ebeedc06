import { kelvin } from './kelvin.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/**
 * What a volume as measured is multiplied by to stand at 0 °C and 101.325 kPa, dry:
 * (273.15/(273.15 + t))·(p − pH2O)/101.325.
 * @param waterVapourKpa partial pressure of water in the gas as measured
 * Source: textbook definition of standard temperature and pressure, dry.
 */
export function stpdFactor(
  temperatureC: number,
  waterVapourKpa: number,
  pressureKpa = standardPressureKpa,
): number {
  return ((kelvin(0) / kelvin(temperatureC)) * (pressureKpa - waterVapourKpa)) / standardPressureKpa
}
