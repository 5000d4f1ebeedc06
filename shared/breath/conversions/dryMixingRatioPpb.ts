import { standardPressureKpa } from './standardPressureKpa.ts'

/**
 * Mixing ratio in dry gas of one in humid gas: C/(1 − pH2O/p); any unit of mixing ratio.
 * @param waterVapourKpa partial pressure of water, such as the saturation pressure at 37 °C
 */
export function dryMixingRatioPpb(
  humidPpb: number,
  waterVapourKpa: number,
  pressureKpa = standardPressureKpa,
): number {
  return humidPpb / (1 - waterVapourKpa / pressureKpa)
}
