import type { Flag } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'

/** Bounds such as 50 mL/s + 10 % are decimals: a sample on the bound is inside. */
const ROUNDING = 1e-9

/**
 * FLOW: rejects where too many of the window's samples lie outside the target's tolerance, warns where
 * their mean does. Not judged without flow or without a full window.
 */
export function flowFlag({ trace, samples, exhalation }: JudgedExhalation): Flag | null {
  const { flowMlS } = trace.columns
  const { window } = exhalation
  if (!flowMlS || !samples || !window || window.meanFlowMlS === null) return null
  const { targetFlowMlS, flowTolerancePercent, flowOutsidePercent, flowMeanTolerancePercent } =
    trace.settings
  const isOff = (flow: number, tolerancePercent: number) =>
    Math.abs(flow - targetFlowMlS) > (targetFlowMlS * tolerancePercent) / 100 + ROUNDING

  let outside = 0
  for (let i = samples.from; i < samples.to; i++) {
    if (isOff(flowMlS[i]!, flowTolerancePercent)) outside++
  }
  const outsidePercent = (100 * outside) / (samples.to - samples.from)
  const flag = { name: 'FLOW', analyte: null } as const
  if (outsidePercent > flowOutsidePercent + ROUNDING) {
    return {
      ...flag,
      cause: 'flow-outside',
      severity: 'reject',
      value: outsidePercent,
      limit: flowOutsidePercent,
      unit: '%',
    }
  }
  if (!isOff(window.meanFlowMlS, flowMeanTolerancePercent)) return null
  const side = window.meanFlowMlS < targetFlowMlS ? -1 : 1
  return {
    ...flag,
    cause: 'flow-mean',
    severity: 'warn',
    value: window.meanFlowMlS,
    limit: targetFlowMlS * (1 + (side * flowMeanTolerancePercent) / 100),
    unit: 'mL/s',
  }
}
