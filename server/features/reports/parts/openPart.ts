import type { ReportDocument, ReportSection } from '#server/reports/reportDocument.ts'
import { IMPORT_STATE_LABELS } from '#shared/terms/importState.ts'
import { LOCK_KIND_LABELS, LOCK_STATE_LABELS } from '#shared/terms/lockState.ts'
import { formatCount, formatInstant } from '#shared/terms/numbers.ts'
import type { ReportSource } from '../reportSource.ts'
import { completenessSection } from './completeness.ts'
import { reportFrame, shownOfRun } from './reportFrame.ts'
import { subjectsBySite } from './subjectsBySite.ts'

/** The part for the whole team: how far the study is and how complete, and nothing that a result could be read from. */
export function openPart(source: ReportSource): ReportDocument {
  return reportFrame(source, 'open', [
    subjectsBySite(source),
    completenessSection(source),
    ...(source.study.kind === 'earlierData' ? [importsSection(source)] : []),
    locksSection(source),
  ])
}

function importsSection({ imports }: ReportSource): ReportSection {
  const rows = imports.map((each) => [
    `No. ${each.number}`,
    IMPORT_STATE_LABELS[each.state],
    each.enteredAt ? whenAndWho(each.enteredAt, each.uploadedByName) : 'not entered',
    each.counts ? formatCount(each.counts.rows) : 'not counted',
    `${each.fileHash.slice(0, 16)} …`,
  ])
  return {
    heading: 'Files of earlier data',
    blocks: [
      rows.length === 0
        ? { kind: 'paragraph', text: 'No file was brought in.' }
        : {
            kind: 'table',
            columns: [
              { label: 'File' },
              { label: 'State' },
              { label: 'Entered' },
              { label: 'Rows', align: 'right' },
              { label: 'SHA-256 of the file' },
            ],
            rows,
          },
    ],
  }
}

function locksSection({ locks, analyses, analysesRun }: ReportSource): ReportSection {
  const signed = locks.flatMap((lock) =>
    lock.signedAt
      ? [
          {
            kind: 'paragraph' as const,
            quiet: true,
            text: `${LOCK_KIND_LABELS[lock.kind]} ${lock.number} signed by ${lock.signedBy}, ${formatInstant(lock.signedAt.toISOString())}: “${lock.signedMeaning}”`,
          },
        ]
      : [],
  )
  return {
    heading: 'Lock and analyses',
    blocks: [
      {
        kind: 'table',
        columns: [
          { label: 'Request' },
          { label: 'State' },
          { label: 'Asked for' },
          { label: 'Decided' },
        ],
        rows: locks.map((lock) => [
          `${LOCK_KIND_LABELS[lock.kind]} ${lock.number}`,
          LOCK_STATE_LABELS[lock.state],
          whenAndWho(lock.requestedAt, lock.requestedByName),
          lock.decidedAt ? whenAndWho(lock.decidedAt, lock.decidedByName) : 'not yet',
        ]),
      },
      ...signed,
      {
        kind: 'paragraph',
        text: `${shownOfRun(analyses.length, analysesRun)} in the closed part of this report, which goes to oversight monitors and analysts alone. This part holds no accuracy, no agreement, and no outcome split by a sensor value.`,
      },
    ],
  }
}

const whenAndWho = (at: Date, name: string | null): string =>
  `${formatInstant(at.toISOString())}\n${name ?? 'by a person no longer known'}`
