import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import type { PanelParameters, PanelResult } from '#shared/schemas/panel.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { netBenefit } from '#shared/statistics/cutOffs/netBenefit.ts'
import { zFor } from '#shared/statistics/distributions/zFor.ts'
import { brierScore } from '#shared/statistics/panel/brierScore.ts'
import { calibrationOfProbabilities } from '#shared/statistics/panel/calibrationOfProbabilities.ts'
import { crossValidatedPanelArea } from '#shared/statistics/panel/crossValidatedPanelArea.ts'
import type { LogisticData } from '#shared/statistics/panel/fitLogistic.ts'
import { logisticRegression } from '#shared/statistics/panel/logisticRegression.ts'
import { panelArea } from '#shared/statistics/panel/panelArea.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { Sampling } from '#shared/terms/protocol.ts'
import { type CompleteSubject, completeSubjects } from './completeSubjects.ts'
import { LEAST_PER_CLASS, tooFew, withheldSentence } from './leastPerClass.ts'
import { storedCurveOf } from './storedCurveOf.ts'

type Analytes = DatasetManifest['analytes']

/** Probabilities at which somebody might act. */
const THRESHOLDS = [0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6, 0.7]
const FOLDS = 10
const FITTED_HERE =
  'In the data that the panel was fitted to, slope 1 and intercept 0 hold by construction and prove nothing; only other subjects can show whether the probabilities mean what they say.'
const BY_OUTCOME =
  'Net benefit is left out: subjects were chosen by outcome, so the share of them with the condition is the study’s own making.'
const SAME_DATA =
  'Probabilities, Brier score and net benefit are those of the data that the panel was fitted to, and flatter it; only the corrected area takes that off.'

/**
 * The outcome on several analytes by logistic regression, with the area of the panel corrected for
 * having been fitted to the same subjects.
 * @throws StatisticsError as logisticRegression; not-positive (logarithm of a value at or below 0)
 */
export function panelResultOf(
  rows: readonly DatasetRow[],
  analytes: Analytes,
  parameters: PanelParameters,
  sampling: Sampling,
  onProgress?: (share: number) => void,
): PanelResult {
  const { analyteKeys, scale, sessionRule, confidence: level } = parameters
  const named = analyteKeys.map((key) => analytes.find((each) => each.key === key)!)
  const { subjects, counts } = completeSubjects(rows, analyteKeys, sessionRule)
  const data: LogisticData = {
    predictors: named.map(({ name }, at) => ({
      name: scale === 'log' ? `ln ${name}` : name,
      values: columnOf(subjects, at, scale, name),
    })),
    outcomes: subjects.map((each) => each.present),
  }
  const model = logisticRegression(data, { level })
  const fitted = {
    present: [...model.fitted].filter((_, at) => subjects[at]!.present),
    absent: [...model.fitted].filter((_, at) => !subjects[at]!.present),
  }
  const few = tooFew(counts.present, counts.absent)
  const { brier, scaled } = brierScore(model.fitted, data.outcomes)
  return {
    kind: 'panel',
    analyteName: named.map((each) => each.name).join(', '),
    unit: named[0]!.unit,
    counts,
    terms: model.terms.map((each) => termOf(each, level)),
    area: few ? null : areaOf(data, parameters, onProgress),
    areaWithheld: few ? withheldSentence(counts.present, counts.absent) : null,
    curve: storedCurveOf(rocCurve({ ...fitted, direction: 'higher' })),
    brier: { brier, scaled },
    calibration: calibrationOf(model.fitted, data),
    netBenefit: sampling === 'byOutcome' ? null : netBenefit(fitted, THRESHOLDS).map(benefitOf),
    netBenefitHidden: sampling === 'byOutcome' ? BY_OUTCOME : null,
    likelihoodRatio: model.likelihoodRatio,
    caveats: [SAME_DATA, ...fewForSoMany(counts, named.length)],
  }
}

function columnOf(
  subjects: readonly CompleteSubject[],
  at: number,
  scale: PanelParameters['scale'],
  name: string,
): number[] {
  const values = subjects.map((each) => each.values[at]!)
  if (scale === 'raw') return values
  const below = values.filter((value) => value <= 0).length
  if (below > 0)
    throw new StatisticsError(
      'not-positive',
      `${name} has ${below} ${below === 1 ? 'value' : 'values'} at or below 0, which have no logarithm. Use the values as they are.`,
    )
  return values.map(Math.log)
}

function areaOf(
  data: LogisticData,
  { validation, resampling }: PanelParameters,
  onProgress?: (share: number) => void,
): NonNullable<PanelResult['area']> {
  const draws = { ...resampling, ...(onProgress ? { onProgress } : {}) }
  const common = { lower: null, upper: null, seed: resampling.seed }
  if (validation === 'bootstrap') {
    const { corrected, apparent, method, replicates, failed } = panelArea(data, draws)
    return { ...common, estimate: corrected, apparent, method, replicates, failed }
  }
  const found = crossValidatedPanelArea(data, { ...draws, folds: FOLDS })
  const { corrected, apparent, method, repeats } = found
  return { ...common, estimate: corrected, apparent, method, replicates: repeats, failed: 0 }
}

type Model = ReturnType<typeof logisticRegression>

function termOf(
  { term, estimate, standardError, p, oddsRatio, oddsRatioInterval }: Model['terms'][number],
  level: number,
): PanelResult['terms'][number] {
  const half = zFor(level) * standardError
  return {
    term,
    estimate,
    lower: estimate - half,
    upper: estimate + half,
    standardError,
    p,
    oddsRatio,
    oddsRatioLower: oddsRatioInterval?.lower ?? null,
    oddsRatioUpper: oddsRatioInterval?.upper ?? null,
  }
}

function calibrationOf(fitted: Float64Array, data: LogisticData): PanelResult['calibration'] {
  try {
    return { ...calibrationOfProbabilities(fitted, data.outcomes), note: FITTED_HERE }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    const present = [...fitted].reduce((sum, each) => sum + each, 0) / fitted.length
    const share = Array.from(data.outcomes).filter(Boolean).length / fitted.length
    return {
      slope: null,
      intercept: null,
      meanFitted: present,
      prevalence: share,
      note: error.message,
    }
  }
}

type Benefit = ReturnType<typeof netBenefit>[number]
const benefitOf = ({
  threshold,
  truePositives,
  falsePositives,
  netBenefit,
  treatAll,
}: Benefit) => ({
  threshold,
  truePositives,
  falsePositives,
  netBenefit,
  treatAll,
})

/** A rule of thumb: ten subjects of the smaller class for each analyte (Peduzzi et al 1996, J Clin Epidemiol 49:1373). */
function fewForSoMany({ present, absent }: PanelResult['counts'], analytes: number): string[] {
  const smaller = Math.min(present, absent)
  if (smaller >= LEAST_PER_CLASS * analytes) return []
  return [
    `There are ${smaller} subjects in the smaller class for ${analytes} analytes; with fewer than ten for each the coefficients are unsteady. Use fewer analytes.`,
  ]
}
