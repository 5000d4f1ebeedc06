import type { ReportDocument, ReportPair, ReportSection } from '#server/reports/reportDocument.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { LOCK_KIND_LABELS } from '#shared/terms/lockState.ts'
import { formatCount, formatInstant } from '#shared/terms/numbers.ts'
import { REPORT_PART_LABELS, type ReportPart } from '#shared/terms/reportState.ts'
import type { ReportSource } from '../reportSource.ts'

const SUBTITLES: Record<ReportPart, string> = {
  open: 'Numbers of subjects, completeness and lock. No accuracy, no agreement.',
  closed: 'Results on locked data, for oversight monitors and analysts alone.',
}

/** What both parts share: heading, stamp, caution, provenance, and the dataset's hash on every page. */
export function reportFrame(
  source: ReportSource,
  part: ReportPart,
  sections: readonly ReportSection[],
): ReportDocument {
  const { report, study, dataset } = source
  const caution = CAUTIONS[dataset.protocol.regulatoryStatus]
  return {
    title: report.title,
    subtitle: `${study.code}: ${study.title}. ${SUBTITLES[part]}`,
    header: {
      study: study.code,
      part: REPORT_PART_LABELS[part],
      ...stampOf(study),
    },
    caution: { heading: caution.title, text: caution.text },
    datasetHash: dataset.hash,
    provenance: provenanceOf(source),
    createdAt: report.issuedAt.toISOString(),
    sections,
  }
}

function stampOf({ kind, demonstration }: ReportSource['study']): { stamp?: string } {
  const stamps = [
    ...(kind === 'earlierData' ? ['Unblinded: earlier data'] : []),
    ...(demonstration ? ['Invented data'] : []),
  ]
  return stamps.length > 0 ? { stamp: stamps.join(' · ') } : {}
}

function provenanceOf({ report, dataset, analyses, analysesRun }: ReportSource): ReportPair[] {
  const { manifest } = dataset
  return [
    {
      label: 'Report',
      value: `No. ${report.number}, asked for ${formatInstant(report.issuedAt.toISOString())} by ${report.issuedByName ?? 'a person no longer known'}`,
    },
    {
      label: 'Dataset',
      value: `${LOCK_KIND_LABELS[dataset.lockKind]} ${dataset.lockNumber}, frozen ${formatInstant(dataset.frozenAt.toISOString())}`,
    },
    {
      label: 'Holds',
      value: `${formatCount(dataset.subjectCount)} subjects in ${formatCount(dataset.rowCount)} rows`,
    },
    {
      label: 'Protocol',
      value: `Version ${manifest.protocolVersion}, ${shortHash(manifest.protocolHash)}`,
    },
    { label: 'Analyses', value: shownOfRun(analyses.length, analysesRun) },
    {
      label: 'Audit trail at the lock',
      value: `${formatCount(manifest.auditCount)} events, head ${shortHash(manifest.auditHeadHash)}`,
    },
  ]
}

/** A report never shows only what pleases without saying so. */
export const shownOfRun = (shown: number, run: number): string =>
  `${formatCount(shown)} of ${formatCount(run)} ${run === 1 ? 'analysis' : 'analyses'} run on this dataset ${shown === 1 ? 'is' : 'are'} shown`

export const shortHash = (hash: string): string => `${hash.slice(0, 4)} ${hash.slice(4, 8)} …`
