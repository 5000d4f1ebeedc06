import type { ReportBlock, ReportPair } from '#server/reports/reportDocument.ts'
import {
  ANALYSIS_BADGE_LABELS,
  EARLIER_DATA_BADGE_REASON,
  LEFT_OUT_LABELS,
  SESSION_RULE_LABELS,
} from '#shared/terms/analysis.ts'
import { formatCount, formatInstant } from '#shared/terms/numbers.ts'
import type { ReportSource, StoredAnalysis } from '../reportSource.ts'
import { shortHash } from './reportFrame.ts'

/** What an analysis is, who is counted in it and who is not and why, and what it takes to repeat it. */
export function analysisFacts(source: ReportSource, analysis: StoredAnalysis): ReportBlock[] {
  const { result, parameters, badge } = analysis
  const { leftOut } = result.counts
  return [
    {
      kind: 'keyValues',
      pairs: [
        { label: 'Standing', value: standingOf(source, badge) },
        { label: 'Measured', value: result.analyteName },
        ...sessionsOf(parameters),
        { label: 'Counted', value: countedInWords(result) },
        ...belowLodOf(result.counts.belowLod),
        ...provenanceOf(source, analysis),
      ],
    },
    leftOut.length === 0
      ? { kind: 'paragraph', text: 'No subject of the dataset was left out.', quiet: true }
      : {
          kind: 'table',
          columns: [{ label: 'Left out, and why' }, { label: 'Subjects', align: 'right' }],
          rows: leftOut.map(({ reason, subjects }) => [
            LEFT_OUT_LABELS[reason],
            formatCount(subjects),
          ]),
        },
  ]
}

/** Which sessions went in; precision looks at all of them. */
const sessionsOf = (parameters: StoredAnalysis['parameters']): ReportPair[] =>
  'sessionRule' in parameters
    ? [{ label: 'Sessions', value: SESSION_RULE_LABELS[parameters.sessionRule] }]
    : []

/** Planned or exploratory, and why. */
export function standingOf({ study }: ReportSource, badge: StoredAnalysis['badge']): string {
  return study.kind === 'earlierData' && badge === 'exploratory'
    ? EARLIER_DATA_BADGE_REASON
    : ANALYSIS_BADGE_LABELS[badge]
}

/** Who is counted, of how many. */
export function countedInWords(result: StoredAnalysis['result']): string {
  if ('present' in result.counts) {
    const { present, absent, subjects, values } = result.counts
    const counted = present + absent
    const several = values > counted ? `, ${formatCount(values)} values` : ''
    return `${formatCount(counted)} of ${formatCount(subjects)} subjects: ${formatCount(present)} present, ${formatCount(absent)} absent${several}`
  }
  const { counted, subjects, pairs } = result.counts
  const what = result.kind === 'precision' ? 'readings' : 'pairs'
  return `${formatCount(counted)} of ${formatCount(subjects)} subjects, ${formatCount(pairs)} ${what}`
}

const belowLodOf = (values: number): ReportPair[] =>
  values === 0
    ? []
    : [
        {
          label: 'Below detection',
          value: `${formatCount(values)} values below the limit of detection, counted as they were given`,
        },
      ]

function provenanceOf(source: ReportSource, analysis: StoredAnalysis): ReportPair[] {
  return [
    {
      label: 'Run',
      value: `${formatInstant(analysis.runAt.toISOString())} by ${analysis.runByName}`,
    },
    {
      label: 'Repeat with',
      value: `dataset ${shortHash(source.dataset.hash)}, protocol version ${analysis.protocolVersion}, statistics ${analysis.statisticsVersion}, seed ${analysis.seed}; result ${shortHash(analysis.resultHash)}`,
    },
  ]
}
