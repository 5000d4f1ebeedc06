import type { AuditEvent } from '#shared/schemas/auditEvent.ts'
import { auditEventLabel, auditRecordLabel } from '#shared/terms/auditEvents.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { LinkButton } from '../../ui/LinkButton.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'
import { recordInWords, standingOf, valuesInWords } from './auditEventWords.ts'

/** @param open shows everything that an event keeps */
export const auditEventColumns = (open: (event: AuditEvent) => void): TableColumn<AuditEvent>[] => [
  {
    id: 'position',
    header: 'No.',
    value: (event) => event.position,
    cell: (event) => (
      <LinkButton aria-haspopup="dialog" className="prints" onClick={() => open(event)}>
        {formatCount(event.position)}
        <span className="sr-only">: open this event</span>
      </LinkButton>
    ),
  },
  {
    id: 'receivedAt',
    header: 'When',
    value: (event) => event.receivedAt,
    cell: (event) => (
      <span className="whitespace-nowrap max-tablet:whitespace-normal">
        <InstantText at={event.receivedAt} />
      </span>
    ),
  },
  {
    id: 'event',
    header: 'What happened',
    value: (event) => event.event,
    cell: (event) =>
      event.event === 'attempt.refused' ? (
        <Tag tone="warn">{auditEventLabel(event.event)}</Tag>
      ) : (
        auditEventLabel(event.event)
      ),
  },
  {
    id: 'record',
    header: 'Record',
    value: (event) => event.recordLabel,
    cell: (event) => (
      <Lines first={auditRecordLabel(event.recordType)} second={recordInWords(event)} />
    ),
  },
  {
    id: 'person',
    header: 'Who',
    value: (event) => event.personName,
    cell: (event) => <Lines first={event.personName} second={standingOf(event)} />,
  },
  {
    id: 'values',
    header: 'Values and reason',
    value: (event) => event.values.length,
    cell: (event) => (
      <Lines
        first={valuesInWords(event.values)}
        second={event.reasonHidden ? 'reason hidden' : (event.reason ?? '')}
      />
    ),
  },
]

function Lines({ first, second }: { first: string; second: string }) {
  return (
    <>
      {first}
      {second !== '' && <span className="block text-sm text-ink-2">{second}</span>}
    </>
  )
}
