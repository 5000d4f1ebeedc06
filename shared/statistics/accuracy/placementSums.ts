import type { RocCurve } from './rocCurve.ts'

/**
 * Area and DeLong's two placement variances from a curve's counts.
 * A value's placement is the share of the other class that it beats, ties one half. Sums are kept in
 * whole numbers (twice the placement, times the other class's size) and taken from the end where the
 * placements are small, so that perfect separation and a constant marker give exactly 0.
 */
export type PlacementSums = {
  /** Mann–Whitney U: pairs ordered rightly, ties one half. */
  concordantPairs: number
  area: number
  /** Variance of the present's placements (divisor n − 1), null when there is only one. */
  variancePresent: number | null
  varianceAbsent: number | null
}

/** @param curve from rocCurve */
export function placementSums(curve: RocCurve): PlacementSums {
  const { nPresent, nAbsent, truePositives, falsePositives } = curve
  let twiceWins = 0
  let winsP = 0
  let lossesP = 0
  let winsA = 0
  let lossesA = 0
  let previousTp = 0
  let previousFp = 0
  for (let k = 1; k < truePositives.length; k++) {
    const tp = truePositives[k]!
    const fp = falsePositives[k]!
    const present = tp - previousTp
    const absent = fp - previousFp
    if (present > 0) {
      const lost = fp + previousFp
      const won = 2 * nAbsent - lost
      twiceWins += present * won
      winsP += present * won * won
      lossesP += present * lost * lost
    }
    if (absent > 0) {
      const won = tp + previousTp
      const lost = 2 * nPresent - won
      winsA += absent * won * won
      lossesA += absent * lost * lost
    }
    previousTp = tp
    previousFp = fp
  }
  const twiceLosses = 2 * nPresent * nAbsent - twiceWins
  const mostlyWon = twiceWins > twiceLosses
  const total = mostlyWon ? twiceLosses : twiceWins
  const variance = (squares: number, n: number, others: number): number | null =>
    n < 2 ? null : Math.max(0, squares - (total / n) * total) / (4 * others * others * (n - 1))
  return {
    concordantPairs: twiceWins / 2,
    area: twiceWins / (2 * nPresent * nAbsent),
    variancePresent: variance(mostlyWon ? lossesP : winsP, nPresent, nAbsent),
    varianceAbsent: variance(mostlyWon ? lossesA : winsA, nAbsent, nPresent),
  }
}
