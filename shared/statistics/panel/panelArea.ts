import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { areaOfScores } from './areaOfScores.ts'
import { fitLogistic, type LogisticData } from './fitLogistic.ts'
import { linearScores } from './linearScores.ts'

export type PanelArea = {
  /** On the data that the panel was fitted to; never to be shown alone. */
  apparent: number
  /** Mean of (area in the sample fitted − area of that fit in the original data). */
  optimism: number
  /** apparent − optimism: what to expect in other subjects. */
  corrected: number
  replicates: number
  /** Samples in which the model could not be fitted (separation or a constant predictor), left out. */
  failed: number
  seed: number
  method: 'bootstrap, stratified, optimism'
}

/**
 * The area of a panel of several gases with its optimism taken off: the whole fit is repeated in samples
 * drawn with replacement within each outcome.
 * @param data as for logisticRegression  @param options `replicates` 200 unless given
 * @throws StatisticsError as logisticRegression; 'no-convergence' where most samples cannot be fitted
 * Source: Harrell, Lee & Mark 1996, Stat Med 15:361; Efron & Gong 1983, Am Stat 37:36.
 */
export function panelArea(
  data: LogisticData,
  { seed, replicates = 200, onProgress }: Resampling,
): PanelArea {
  requireCount(replicates, 'The number of replicates', 1)
  const { fitted } = fitLogistic(data)
  const apparent = areaOfScores(fitted, data.outcomes)
  const random = randomStream(seed)
  const indices = byOutcome(data.outcomes)
  let sum = 0
  let failed = 0
  for (let r = 0; r < replicates; r++) {
    const rows = indices.flatMap((rowsOfClass) =>
      rowsOfClass.map(() => rowsOfClass[Math.floor(random() * rowsOfClass.length)]!),
    )
    const gain = gainOf(rowsOf(data, rows), data)
    if (gain === null) failed++
    else sum += gain
    onProgress?.((r + 1) / replicates)
  }
  if (failed > replicates / 2) {
    throw new StatisticsError(
      'no-convergence',
      'The panel could not be fitted in most bootstrap samples: too few subjects for so many gases.',
    )
  }
  const optimism = sum / (replicates - failed)
  const method = 'bootstrap, stratified, optimism' as const
  return { apparent, optimism, corrected: apparent - optimism, replicates, failed, seed, method }
}

function byOutcome(outcomes: ArrayLike<boolean | number>): [number[], number[]] {
  const indices: [number[], number[]] = [[], []]
  for (let i = 0; i < outcomes.length; i++) indices[outcomes[i] ? 1 : 0].push(i)
  return indices
}

function rowsOf({ predictors, outcomes }: LogisticData, rows: number[]): LogisticData {
  return {
    predictors: predictors.map(({ name, values }) => ({
      name,
      values: Float64Array.from(rows, (i) => values[i]!),
    })),
    outcomes: rows.map((i) => outcomes[i]!),
  }
}

function gainOf(sample: LogisticData, original: LogisticData): number | null {
  try {
    const { coefficients, fitted } = fitLogistic(sample)
    const scores = linearScores(coefficients, original.predictors)
    return areaOfScores(fitted, sample.outcomes) - areaOfScores(scores, original.outcomes)
  } catch (error) {
    if (error instanceof StatisticsError) return null
    throw error
  }
}
