import { kpaOfMmHg } from './kpaOfMmHg.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/** A partial pressure in mmHg as a percentage of the humid gas: 100·P/p. */
export function humidPercentOfMmHg(mmHg: number, pressureKpa = standardPressureKpa): number {
  return (100 * kpaOfMmHg(mmHg)) / pressureKpa
}
