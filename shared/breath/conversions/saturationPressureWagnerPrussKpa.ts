import { kelvin } from './kelvin.ts'

const CRITICAL_K = 647.096
const CRITICAL_KPA = 22_064

/**
 * Saturation pressure of water, kPa, between the triple and the critical point.
 * Source: Wagner & Pruss 1993, J Phys Chem Ref Data 22:783 (coefficients from memory, checked at 37 °C).
 */
export function saturationPressureWagnerPrussKpa(temperatureC: number): number {
  const t = kelvin(temperatureC)
  const x = 1 - t / CRITICAL_K
  const sum =
    -7.85951783 * x +
    1.84408259 * x ** 1.5 -
    11.7866497 * x ** 3 +
    22.6807411 * x ** 3.5 -
    15.9618719 * x ** 4 +
    1.80122502 * x ** 7.5
  return CRITICAL_KPA * Math.exp((CRITICAL_K / t) * sum)
}
