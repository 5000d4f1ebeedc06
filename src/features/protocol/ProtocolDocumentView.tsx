import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { REGULATORY_STATUS_LABELS } from '#shared/terms/cautions.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { DIRECTION_LABELS, SAMPLING_LABELS } from '#shared/terms/protocol.ts'
import { Facts } from '../../ui/Facts.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { Tag } from '../../ui/Tag.tsx'
import { type AnalyteOption, unitOf } from './analyteOption.ts'

type ProtocolDocumentViewProps = {
  document: ProtocolDocument
  analytes: readonly AnalyteOption[]
}

/** What a version of the protocol says. */
export function ProtocolDocumentView({ document, analytes }: ProtocolDocumentViewProps) {
  const nameOf = (key: string) => analytes.find((each) => each.key === key)?.name ?? key
  /** Digits as they were set, with the unit. */
  const amount = (value: number, key: string) =>
    `${formatConcentration(value, 15)} ${unitOf(analytes, key) ?? ''}`.trim()
  return (
    <div className="flex flex-col gap-7">
      <section>
        <h2>Question</h2>
        <Facts
          layout="rows"
          items={[
            { term: 'Target condition', value: document.targetCondition },
            { term: 'Reference standard', value: document.referenceStandard },
            { term: 'Subjects came in', value: SAMPLING_LABELS[document.sampling] },
            {
              term: 'Planned subjects',
              value:
                document.plannedSubjects === null
                  ? 'No number planned'
                  : formatCount(document.plannedSubjects),
            },
            {
              term: 'Regulatory status',
              value: REGULATORY_STATUS_LABELS[document.regulatoryStatus],
            },
          ]}
        />
      </section>
      <section>
        <h2>Biomarkers</h2>
        <StaticTable
          caption="Biomarkers"
          columns={[
            { header: 'Analyte' },
            { header: 'Direction' },
            { header: 'Planned cut-off', numeric: true },
          ]}
          rows={document.biomarkers.map(({ analyteKey, direction, plannedCutOff }) => ({
            key: analyteKey,
            cells: [
              <span key="name" className="flex flex-wrap items-baseline gap-2">
                {nameOf(analyteKey)}
                {analyteKey === document.primaryAnalyteKey && <Tag>Primary</Tag>}
              </span>,
              DIRECTION_LABELS[direction],
              plannedCutOff === null ? 'none' : amount(plannedCutOff, analyteKey),
            ],
          }))}
        />
      </section>
      <section>
        <h2>Acceptance limits</h2>
        {document.acceptanceLimits.length === 0 ? (
          <p className="text-ink-2">
            None. Agreement with a reference analyser is then shown without a verdict.
          </p>
        ) : (
          <StaticTable
            caption="Acceptance limits: sensor minus reference analyser"
            columns={[
              { header: 'Sensor minus analyser' },
              { header: 'Lowest', numeric: true },
              { header: 'Highest', numeric: true },
            ]}
            rows={document.acceptanceLimits.map(({ analyteKey, lower, upper }) => ({
              key: analyteKey,
              cells: [nameOf(analyteKey), amount(lower, analyteKey), amount(upper, analyteKey)],
            }))}
          />
        )}
      </section>
    </div>
  )
}
