/** Alveolar water vapour as physiology takes it, mmHg at 37 °C. */
const ALVEOLAR_WATER_MMHG = 47

/** An alveolar partial pressure in mmHg as a percentage of the dry gas: 100·P/(p − 47 mmHg). */
export function dryPercentOfMmHg(mmHg: number, pressureMmHg = 760): number {
  return (100 * mmHg) / (pressureMmHg - ALVEOLAR_WATER_MMHG)
}
