import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { areaOfScores } from './areaOfScores.ts'
import { fitLogistic, type LogisticData } from './fitLogistic.ts'
import { linearScores } from './linearScores.ts'

export type CrossValidatedPanelArea = {
  apparent: number
  /** Mean over repeats of the mean area in the folds left out. */
  corrected: number
  folds: number
  repeats: number
  seed: number
  method: 'cross-validation, stratified, mean of folds'
}

/**
 * The area of a panel by repeated stratified cross-validation: each fold is scored by a model that has
 * not seen it, and areas are taken within folds (scores of different models are not comparable).
 * @param data as for logisticRegression, at least `folds` subjects of each outcome
 * @param options `folds` 10, `replicates` (repeats) 20 unless given
 * @throws StatisticsError 'too-few', and as logisticRegression where a fold's model cannot be fitted
 * Source: Stone 1974, J R Stat Soc B 36:111; Airola et al 2011, Comput Stat Data Anal 55:1828.
 */
export function crossValidatedPanelArea(
  data: LogisticData,
  { seed, folds = 10, replicates = 20, onProgress }: Resampling & { folds?: number },
): CrossValidatedPanelArea {
  requireCount(folds, 'The number of folds', 2)
  requireCount(replicates, 'The number of repeats', 1)
  const apparent = areaOfScores(fitLogistic(data).fitted, data.outcomes)
  const random = randomStream(seed)
  let sum = 0
  for (let r = 0; r < replicates; r++) {
    const foldOf = assignFolds(data.outcomes, folds, random)
    for (let fold = 0; fold < folds; fold++) sum += areaLeftOut(data, foldOf, fold)
    onProgress?.((r + 1) / replicates)
  }
  const method = 'cross-validation, stratified, mean of folds' as const
  return {
    apparent,
    corrected: sum / (folds * replicates),
    folds,
    repeats: replicates,
    seed,
    method,
  }
}

function assignFolds(
  outcomes: ArrayLike<boolean | number>,
  folds: number,
  random: () => number,
): Int32Array {
  const foldOf = new Int32Array(outcomes.length)
  for (const wanted of [true, false]) {
    const rows: number[] = []
    for (let i = 0; i < outcomes.length; i++) if (Boolean(outcomes[i]) === wanted) rows.push(i)
    if (rows.length < folds) {
      throw new StatisticsError('too-few', `Each outcome needs at least ${folds} subjects.`)
    }
    for (let k = rows.length - 1; k > 0; k--) {
      const other = Math.floor(random() * (k + 1))
      const swap = rows[k]!
      rows[k] = rows[other]!
      rows[other] = swap
    }
    rows.forEach((row, k) => {
      foldOf[row] = k % folds
    })
  }
  return foldOf
}

function areaLeftOut(data: LogisticData, foldOf: Int32Array, fold: number): number {
  const { coefficients } = fitLogistic(rowsWhere(data, (i) => foldOf[i] !== fold))
  const left = rowsWhere(data, (i) => foldOf[i] === fold)
  return areaOfScores(linearScores(coefficients, left.predictors), left.outcomes)
}

function rowsWhere(
  { predictors, outcomes }: LogisticData,
  wanted: (row: number) => boolean,
): LogisticData {
  const rows: number[] = []
  for (let i = 0; i < outcomes.length; i++) if (wanted(i)) rows.push(i)
  return {
    predictors: predictors.map(({ name, values }) => ({
      name,
      values: Float64Array.from(rows, (i) => values[i]!),
    })),
    outcomes: rows.map((i) => outcomes[i]!),
  }
}
