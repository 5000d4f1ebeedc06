import type { RocCurve } from '../accuracy/rocCurve.ts'
import { type CutOffPoint, cutOffPoint } from './cutOffPoint.ts'

/**
 * All cut-offs that tie for the largest Youden index (sensitivity + specificity − 1), strictest first;
 * ties are found in whole numbers. Never empty.
 * Source: Youden 1950, Cancer 3:32.
 */
export function youdenCutOffs(curve: RocCurve): { youdenIndex: number; cutOffs: CutOffPoint[] } {
  const { nPresent, nAbsent, truePositives, falsePositives } = curve
  let best = -Infinity
  let ties: number[] = []
  for (let k = 0; k < truePositives.length; k++) {
    const scaled = truePositives[k]! * nAbsent - falsePositives[k]! * nPresent
    if (scaled > best) {
      best = scaled
      ties = [k]
    } else if (scaled === best) ties.push(k)
  }
  return {
    youdenIndex: best / (nPresent * nAbsent),
    cutOffs: ties.map((k) => cutOffPoint(curve, k)),
  }
}
