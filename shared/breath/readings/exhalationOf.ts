import type { Breath } from '../breaths/Breath.ts'
import type { FlowRun } from '../breaths/FlowRun.ts'
import { exhalationFlags } from '../flags/exhalationFlags.ts'
import type { JudgedExhalation } from '../flags/JudgedExhalation.ts'
import { largestStepS } from '../flags/largestStepS.ts'
import { readingFlags } from '../flags/readingFlags.ts'
import { finiteOrNull } from '../ordering/finiteOrNull.ts'
import type { Exhalation, Flag, PlateauWindow } from '../TraceResult.ts'
import { phaseThreeS } from './phaseThreeS.ts'
import { plateauWindow, type Samples } from './plateauWindow.ts'
import { readingOf } from './readingOf.ts'
import type { Trace } from './Trace.ts'
import { windowFigures } from './windowFigures.ts'

/**
 * One exhalation with its figures, readings, flags and verdicts.
 * @param number from 1 in the order of the trace
 * @param endBeforeS end of the exhalation before; null for the first
 */
export function exhalationOf(
  trace: Trace,
  breath: Breath,
  number: number,
  endBeforeS: number | null,
): Exhalation {
  const run = trace.runHolding(breath.first, breath.last)
  const samples = plateauWindow(trace, breath)
  const window = samples && windowOf(trace, samples)
  const exhalation: Exhalation = {
    number,
    startS: breath.startS,
    endS: breath.endS,
    durationS: durationOf(trace, breath, run),
    cutOff: breath.cutOff,
    volumeMl: run && finiteOrNull(run.volumeMl),
    volumeBtpsMl: run?.volumeBtpsMl ?? null,
    endTidalCo2Percent: breath.co2MaximumPercent,
    inspiredCo2Percent: trace.inspiredCo2Percent,
    meanFlowMlS: run && finiteOrNull(run.meanFlowMlS),
    phaseThreeS: phaseThreeS(trace, breath, run),
    window,
    readings: trace.gases.map((gas) => readingOf(trace, gas, samples, window)),
    flags: [],
    accepted: false,
  }
  const { timeS } = trace.columns
  const longestStepS = largestStepS(timeS, trace.clock, breath.first - 1, breath.last + 1)
  judge({ trace, breath, samples, endBeforeS, longestStepS, exhalation })
  return exhalation
}

/** Gives the exhalation its flags, and it and each of its readings a verdict. */
function judge(judged: JudgedExhalation): void {
  const { exhalation, trace } = judged
  const ofExhalation = exhalationFlags(judged)
  exhalation.accepted = ofExhalation.every(isWarning)
  const ofReadings = exhalation.readings.map((reading, index) => {
    const flags = readingFlags(judged, trace.gases[index]!, reading)
    reading.accepted = exhalation.accepted && reading.meanPpb !== null && flags.every(isWarning)
    return flags
  })
  exhalation.flags = ofExhalation.concat(...ofReadings)
}

function isWarning({ severity }: Flag): boolean {
  return severity === 'warn'
}

/** Of the run of outward flow, whose n samples last n steps; without flow from start to end. */
function durationOf({ clock }: Trace, breath: Breath, run: FlowRun | null): number {
  if (!run) return breath.endS - breath.startS
  return ((run.to - run.from) * clock.intervalTicks) / clock.ticksPerSecond
}

function windowOf({ columns }: Trace, { from, to, startS, endS }: Samples): PlateauWindow {
  const { timeS, co2Percent, flowMlS } = columns
  const co2 = windowFigures(timeS, co2Percent, from, to)
  const flow = flowMlS && windowFigures(timeS, flowMlS, from, to)
  return {
    startS,
    endS,
    n: to - from,
    // CO2 lies between the limits of plausibility, so that its figures always exist.
    meanCo2Percent: co2!.mean,
    co2SlopePercentPerS: co2!.slope,
    meanFlowMlS: flow?.mean ?? null,
  }
}
