import { kelvin } from './kelvin.ts'

/**
 * Saturation pressure of water vapour over water, kPa; closer than the Magnus form at 37 °C.
 * Source: Sonntag 1994, Meteorol Z 3:51 (coefficients from memory, checked at 20 and 37 °C).
 */
export function saturationPressureSonntagKpa(temperatureC: number): number {
  const t = kelvin(temperatureC)
  const logarithm =
    -6096.9385 / t + 16.635794 - 2.711193e-2 * t + 1.673952e-5 * t * t + 2.433502 * Math.log(t)
  return Math.exp(logarithm) / 10
}
