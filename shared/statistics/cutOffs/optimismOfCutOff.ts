import type { RocCurve } from '../accuracy/rocCurve.ts'
import { countResampler } from '../random/countResampler.ts'
import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { type CutOffRule, chosenPoint } from './chosenPoint.ts'
import { type CutOffPoint, cutOffPoint } from './cutOffPoint.ts'

export type CutOffOptimism = {
  rule: CutOffRule
  apparent: CutOffPoint
  /** Mean over replicates: in the sample that chose the cut-off less in the original data. */
  optimism: { sensitivity: number; specificity: number }
  /** Apparent less optimism, kept inside 0…1: what to expect in other subjects. */
  corrected: { sensitivity: number; specificity: number }
  replicates: number
  seed: number
  method: 'bootstrap, stratified'
}

/**
 * How much a cut-off that was chosen on the data flatters itself there: in each bootstrap sample the
 * rule chooses anew, and its sensitivity and specificity are compared with those of the same cut-off
 * in the original data. Of tied cut-offs the strictest is taken.
 * @param curve from rocCurve  @param rule how the cut-off was chosen
 * @throws StatisticsError 'out-of-range'
 * Source: Harrell, Lee & Mark 1996, Stat Med 15:361; cut-offs Leeflang et al 2008, Clin Chem 54:729.
 */
export function optimismOfCutOff(
  curve: RocCurve,
  rule: CutOffRule,
  { seed, replicates = 2000, onProgress }: Resampling,
): CutOffOptimism {
  requireCount(replicates, 'The number of replicates', 1)
  const random = randomStream(seed)
  const drawPresent = countResampler(curve.truePositives, random)
  const drawAbsent = countResampler(curve.falsePositives, random)
  let gainSensitivity = 0
  let gainSpecificity = 0
  for (let r = 0; r < replicates; r++) {
    const sample = { ...curve, truePositives: drawPresent(), falsePositives: drawAbsent() }
    const k = chosenPoint(sample, rule)
    gainSensitivity += (sample.truePositives[k]! - curve.truePositives[k]!) / curve.nPresent
    gainSpecificity += (curve.falsePositives[k]! - sample.falsePositives[k]!) / curve.nAbsent
    if (r % 100 === 99) onProgress?.((r + 1) / replicates)
  }
  const apparent = cutOffPoint(curve, chosenPoint(curve, rule))
  const optimism = {
    sensitivity: gainSensitivity / replicates,
    specificity: gainSpecificity / replicates,
  }
  const corrected = {
    sensitivity: inUnit(apparent.sensitivity - optimism.sensitivity),
    specificity: inUnit(apparent.specificity - optimism.specificity),
  }
  return { rule, apparent, optimism, corrected, replicates, seed, method: 'bootstrap, stratified' }
}

function inUnit(value: number): number {
  return Math.max(0, Math.min(1, value))
}
