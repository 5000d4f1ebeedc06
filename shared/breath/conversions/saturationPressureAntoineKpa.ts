import { kpaOfMmHg } from './kpaOfMmHg.ts'

/**
 * Saturation pressure of water vapour, kPa: 10^(8.07131 − 1730.63/(233.426 + t)) mmHg.
 * Source: Antoine's equation with the constants of Dean, Lange's Handbook (from memory), 1–100 °C.
 */
export function saturationPressureAntoineKpa(temperatureC: number): number {
  return kpaOfMmHg(10 ** (8.07131 - 1730.63 / (233.426 + temperatureC)))
}
