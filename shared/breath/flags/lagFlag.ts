import type { TraceGas } from '../readings/Trace.ts'
import type { Flag } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'

/** LAG: the instrument's rise against the exhalation's duration; not judged where it is not known. */
export function lagFlag({ trace, exhalation }: JudgedExhalation, gas: TraceGas): Flag | null {
  const rise = gas.known.responseT1090S
  if (rise === undefined) return null
  const { clock, settings } = trace
  const { lagRejectDivisor, lagWarnDivisor } = settings
  const isBeyond = (divisor: number) =>
    clock.ticks(rise * divisor) > clock.ticks(exhalation.durationS)
  if (!isBeyond(lagWarnDivisor) && !isBeyond(lagRejectDivisor)) return null
  const rejects = isBeyond(lagRejectDivisor)
  return {
    name: 'LAG',
    cause: 'slow-response',
    severity: rejects ? 'reject' : 'warn',
    analyte: gas.analyte,
    value: rise,
    limit: exhalation.durationS / (rejects ? lagRejectDivisor : lagWarnDivisor),
    unit: 's',
  }
}
