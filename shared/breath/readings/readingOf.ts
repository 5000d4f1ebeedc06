import { dilutionCorrectedPpb } from '../conversions/dilutionCorrectedPpb.ts'
import { normalisedToCo2Ppb } from '../conversions/normalisedToCo2Ppb.ts'
import { finiteOrNull } from '../ordering/finiteOrNull.ts'
import { percentileOf } from '../ordering/percentileOf.ts'
import type { PlateauWindow, Reading } from '../TraceResult.ts'
import { adjustedIf } from './adjustedIf.ts'
import { inverseFiltered } from './inverseFiltered.ts'
import type { Samples } from './plateauWindow.ts'
import type { Trace, TraceGas } from './Trace.ts'
import { windowFigures } from './windowFigures.ts'

/**
 * One gas over the plateau window; without a full window, or where the aligned gas does not reach over
 * all of it, there is no reading. The verdict is given later: it starts as
 * not accepted.
 */
export function readingOf(
  trace: Trace,
  gas: TraceGas,
  samples: Samples | null,
  window: PlateauWindow | null,
): Reading {
  const { columns, settings } = trace
  const { analyte, known, ppb, roomAirPpb } = gas
  const figures = samples && windowFigures(columns.timeS, ppb, samples.from, samples.to)
  const mean = figures?.mean ?? null
  const slope = figures?.slope ?? null
  const flowLS = window?.meanFlowMlS ? window.meanFlowMlS / 1000 : null
  const perMean = (value: number | null) =>
    value === null || !mean ? null : finiteOrNull(value / mean)

  return {
    analyte,
    n: figures?.n ?? 0,
    meanPpb: mean,
    medianPpb: samples && figures ? medianOf(ppb, samples, trace.scratch) : null,
    sdPpb: figures?.sd ?? null,
    slopePpbPerS: slope,
    changePercent: perMean(slope === null ? null : 100 * slope * settings.windowS),
    normalisedSlopePerL: perMean(slope === null || flowLS === null ? null : slope / flowLS),
    inverseFilteredMeanPpb: samples && figures ? filteredMean(trace, gas, samples) : null,
    censored: mean !== null && known.lodPpb !== undefined && mean < known.lodPpb,
    gradientPpb: mean === null || roomAirPpb === null ? null : finiteOrNull(mean - roomAirPpb),
    co2Normalised: adjustedIf(settings.normalise, analyte, settings, () =>
      mean === null || !window
        ? null
        : normalisedToCo2Ppb(mean, window.meanCo2Percent, settings.referenceCo2Percent),
    ),
    dilutionCorrected: adjustedIf(settings.correctDilution, analyte, settings, () =>
      mean === null || !window || roomAirPpb === null
        ? null
        : dilutionCorrectedPpb(mean, {
            roomAirPpb,
            co2Percent: window.meanCo2Percent,
            inspiredCo2Percent: trace.inspiredCo2Percent,
            alveolarCo2Percent: settings.alveolarCo2Percent,
          }),
    ),
    accepted: false,
  }
}

function medianOf(ppb: Float64Array, { from, to }: Samples, scratch: Float64Array): number {
  for (let i = from; i < to; i++) scratch[i - from] = ppb[i]!
  return percentileOf(scratch, to - from, 50)
}

/** Null where the protocol does not ask for the filter, or with a time constant it may not have. */
function filteredMean(
  { columns, settings }: Trace,
  { known, ppb }: TraceGas,
  { from, to }: Samples,
): number | null {
  const { inverseFilterS } = known
  if (!inverseFilterS || inverseFilterS > settings.longestInverseFilterS) return null
  const values = inverseFiltered(columns.timeS, ppb, inverseFilterS, from, to)
  return finiteOrNull(values.reduce((sum, value) => sum + value, 0) / values.length)
}
