import type { IntraclassForm, PrecisionResult } from '#shared/schemas/precision.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import {
  formatCount,
  formatEstimate,
  formatInterval,
  formatPercent,
  NOT_ESTIMABLE,
} from '#shared/terms/numbers.ts'
import {
  agreementDecimals,
  intervalHeading,
  lineTexts,
  withUnit,
} from '#shared/terms/resultText.ts'
import type { ResultTable } from './ResultTable.ts'

const FORM_LABELS: Record<IntraclassForm, string> = {
  single1: 'ICC(1,1), one session, one-way',
  single2: 'ICC(2,1), one session, absolute agreement',
  single3: 'ICC(3,1), one session, consistency',
  mean1: 'ICC(1,k), mean of the sessions, one-way',
  mean2: 'ICC(2,k), mean of the sessions, absolute agreement',
  mean3: 'ICC(3,k), mean of the sessions, consistency',
}

/** Spread within and between subjects. */
export function precisionTable(result: PrecisionResult, confidence: number): ResultTable {
  const unit = unitLabel(result.unit)
  const { withinSubjectSd, cvPercent, cvLogPercent, reliability } = result
  const decimals = agreementDecimals(withinSubjectSd.estimate)
  const within = lineTexts(withinSubjectSd, decimals)
  const percent = (value: number | null) =>
    value === null ? NOT_ESTIMABLE : formatPercent(value / 100)
  const number = (value: number | null) => withUnit(formatEstimate(value, decimals), unit)
  return {
    caption: 'How readings repeat from session to session',
    columns: [
      { header: 'Measure' },
      { header: 'Estimate', numeric: true },
      { header: intervalHeading(confidence), numeric: true },
    ],
    rows: [
      ['Within-subject SD', withUnit(within.estimate, unit), within.interval],
      ['Repeatability coefficient', number(result.repeatabilityCoefficient), ''],
      ['Mean of all readings', number(result.mean), ''],
      ['CV within subjects', percent(cvPercent), ''],
      ['CV within subjects, by logarithms', percent(cvLogPercent), ''],
      ['Between-subject SD', number(result.betweenSubjectSd), ''],
      ['Reliability of a single session, one-way', formatEstimate(reliability), ''],
    ],
    notes: [
      `Two sessions of one subject differ by less than the repeatability coefficient in 95 % of pairs. Interval: ${withinSubjectSd.method}.`,
      ...(cvLogPercent === null ? ['A CV by logarithms needs values above 0.'] : []),
    ],
  }
}

/** The six intraclass correlations; without a full table, why not. */
export function intraclassTable(result: PrecisionResult, confidence: number): ResultTable | string {
  const { intraclass, sessionsEach, effectiveSessions } = result
  if (!intraclass)
    return sessionsEach === null
      ? `Subjects have different numbers of sessions (${formatEstimate(effectiveSessions, 2)} each in effect), so the spread is divided one-way, and the six intraclass correlations, which need the same number of each subject, are not given.`
      : 'Nothing varies, so there are no intraclass correlations.'
  return {
    caption: `Intraclass correlations, ${formatCount(sessionsEach ?? 0)} sessions each`,
    columns: [
      { header: 'Form' },
      { header: 'Estimate', numeric: true },
      { header: intervalHeading(confidence), numeric: true },
    ],
    rows: intraclass.map(({ form, estimate, lower, upper }) => [
      FORM_LABELS[form],
      formatEstimate(estimate),
      formatInterval(lower, upper),
    ]),
    notes: [
      `Sessions take the place of raters. Intervals: ${intraclass[0]!.method}.`,
      ...new Set(intraclass.flatMap(({ note }) => note ?? [])),
    ],
  }
}

/** How many sessions it takes, as a sentence. */
export function sessionsWords(
  { sessionsForReliability: sessions }: PrecisionResult,
  wanted: number,
): string {
  const reliability = formatEstimate(wanted, 2)
  if (sessions === null)
    return `How many sessions would give a reliability of ${reliability} cannot be told: that takes a reliability of a single session between 0 and 1.`
  return sessions === 1
    ? `A single session has a reliability of at least ${reliability}.`
    : `The mean of ${formatCount(sessions)} sessions is expected to have a reliability of ${reliability} (Spearman–Brown).`
}

/** What the noise costs the area of a stored accuracy analysis; null where none was named. */
export function noiseTable({ noise }: PrecisionResult): ResultTable | string | null {
  if (!noise) return null
  const { analysisNumber, observedArea, areaWithoutNoise, expected, note } = noise
  if (areaWithoutNoise === null)
    return `What the noise costs analysis no. ${analysisNumber} cannot be told. ${note ?? ''}`
  return {
    caption: `What the noise costs the area of analysis no. ${analysisNumber}`,
    columns: [{ header: 'Area under the curve' }, { header: 'Expected', numeric: true }],
    rows: [
      ['As stored', formatEstimate(observedArea)],
      ...expected.map(({ sessions, area }) => [
        sessions === 1 ? 'With one session a subject' : `With the mean of ${sessions} sessions`,
        formatEstimate(area),
      ]),
      ['Without the noise between sessions', formatEstimate(areaWithoutNoise)],
    ],
    notes: [
      'For values that are normal within each class (Reiser 2000). These are expectations that rest on the stored area and on the spread found here, without an interval of their own: they say what more sessions could bring, and are no result of accuracy.',
    ],
  }
}
