import { kelvin } from './kelvin.ts'
import { saturationPressureKpa } from './saturationPressureKpa.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

const BODY_C = 37

/**
 * What a volume as measured is multiplied by to stand at body temperature and pressure, saturated:
 * (310.15/(273.15 + t))·(p − pH2O)/(p − e(37 °C)), with e by the WMO formula.
 * @param waterVapourKpa partial pressure of water in the gas as measured
 * Source: Miller et al. 2005, Eur Respir J 26:319 (ATS/ERS, from memory); published tables agree.
 */
export function btpsFactor(
  temperatureC: number,
  waterVapourKpa: number,
  pressureKpa = standardPressureKpa,
): number {
  return (
    ((kelvin(BODY_C) / kelvin(temperatureC)) * (pressureKpa - waterVapourKpa)) /
    (pressureKpa - saturationPressureKpa(BODY_C))
  )
}
