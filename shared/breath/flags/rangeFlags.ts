import type { TraceGas } from '../readings/Trace.ts'
import type { Flag, Reading } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'
import { rawMaximum } from './rawMaximum.ts'

/**
 * RANGE of one gas: rejects saturation in the window, a gap in time within the exhalation, and a window
 * that the aligned gas does not fill; warns below the limit of detection.
 */
export function rangeFlags(judged: JudgedExhalation, gas: TraceGas, reading: Reading): Flag[] {
  const flag = { name: 'RANGE', severity: 'reject', analyte: gas.analyte } as const
  const flags: Flag[] = []
  const gap = gapOf(judged)
  if (gap !== null) {
    const limit = judged.trace.settings.gapS
    flags.push({ ...flag, cause: 'gap', value: gap, limit, unit: 's' })
  }
  if (judged.samples && reading.meanPpb === null) {
    flags.push({ ...flag, cause: 'incomplete', value: null, limit: null, unit: 'ppb' })
  }
  const { rangeMaxPpb, lodPpb } = gas.known
  if (rangeMaxPpb !== undefined && judged.samples) {
    const value = rawMaximum(judged.trace, gas, judged.samples)
    if (value >= rangeMaxPpb) {
      flags.push({ ...flag, cause: 'saturated', value, limit: rangeMaxPpb, unit: 'ppb' })
    }
  }
  if (reading.censored) {
    flags.push({
      ...flag,
      severity: 'warn',
      cause: 'below-detection',
      value: reading.meanPpb,
      limit: lodPpb!,
      unit: 'ppb',
    })
  }
  return flags
}

/** The longest step in time within the exhalation and at its edges, if it is a gap. */
function gapOf({ trace, longestStepS }: JudgedExhalation): number | null {
  return trace.clock.ticks(longestStepS) > trace.clock.ticks(trace.settings.gapS)
    ? longestStepS
    : null
}
