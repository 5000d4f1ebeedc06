import type { RocCurve } from '../accuracy/rocCurve.ts'
import { closestToCornerCutOffs } from './closestToCornerCutOffs.ts'
import type { CutOffPoint } from './cutOffPoint.ts'
import { type ConstrainedCutOffs, cutOffsWithAtLeast } from './cutOffsWithAtLeast.ts'
import { youdenCutOffs } from './youdenCutOffs.ts'

export type CutOffRules = {
  youden: { youdenIndex: number; cutOffs: CutOffPoint[] }
  closestToCorner: { squaredDistance: number; cutOffs: CutOffPoint[] }
  sensitivityAtLeast: ConstrainedCutOffs & { least: number }
  specificityAtLeast: ConstrainedCutOffs & { least: number }
}

/**
 * The cut-offs that the four usual rules choose, with all their ties. A cut-off chosen so from the data
 * it is judged on looks better than it is: mark it exploratory and show optimismOfCutOff beside it.
 * @param options `sensitivity`, `specificity`: the least wanted, 0.9 unless given
 * @throws StatisticsError 'out-of-range'
 */
export function cutOffRules(
  curve: RocCurve,
  { sensitivity = 0.9, specificity = 0.9 }: { sensitivity?: number; specificity?: number } = {},
): CutOffRules {
  return {
    youden: youdenCutOffs(curve),
    closestToCorner: closestToCornerCutOffs(curve),
    sensitivityAtLeast: {
      least: sensitivity,
      ...cutOffsWithAtLeast(curve, 'sensitivity', sensitivity),
    },
    specificityAtLeast: {
      least: specificity,
      ...cutOffsWithAtLeast(curve, 'specificity', specificity),
    },
  }
}
