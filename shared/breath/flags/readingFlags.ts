import type { TraceGas } from '../readings/Trace.ts'
import type { Flag, Reading } from '../TraceResult.ts'
import { ambientFlag } from './ambientFlag.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'
import { lagFlag } from './lagFlag.ts'
import { rangeFlags } from './rangeFlags.ts'
import { slopeFlag } from './slopeFlag.ts'

/** The flags that concern one gas: RANGE, PLATEAU_SLOPE, AMBIENT, LAG. */
export function readingFlags(judged: JudgedExhalation, gas: TraceGas, reading: Reading): Flag[] {
  const flags = rangeFlags(judged, gas, reading)
  const { settings } = judged.trace
  for (const flag of [
    slopeFlag(reading, settings),
    ambientFlag(reading, gas.roomAirPpb, settings),
    lagFlag(judged, gas),
  ]) {
    if (flag) flags.push(flag)
  }
  return flags
}
