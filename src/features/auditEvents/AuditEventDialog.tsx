import type { AuditEvent, AuditValue } from '#shared/schemas/auditEvent.ts'
import { auditEventLabel, auditFieldLabel, auditRecordLabel } from '#shared/terms/auditEvents.ts'
import { formatLocalInstant } from '#shared/terms/localTime.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { recordInWords, standingOf } from './auditEventWords.ts'

type AuditEventDialogProps = { event: AuditEvent | null; onClose: () => void }

/** One event whole: who, when, where, why, and each value before and after. */
export function AuditEventDialog({ event, onClose }: AuditEventDialogProps) {
  return (
    <Dialog
      wide
      open={event !== null}
      onClose={onClose}
      title={event ? `${formatCount(event.position)}. ${auditEventLabel(event.event)}` : ''}
    >
      {event && <EventParts event={event} />}
    </Dialog>
  )
}

function EventParts({ event }: { event: AuditEvent }) {
  return (
    <div className="flex flex-col gap-5">
      <Facts layout="rows" items={factsOf(event)} />
      {event.values.length > 0 ? (
        <StaticTable
          caption="Values"
          columns={[{ header: 'Field' }, { header: 'Before' }, { header: 'After' }]}
          rows={event.values.map((value, index) => ({
            key: `${index} ${value.field}`,
            cells: [
              auditFieldLabel(value.field),
              <ValueText key="old" value={value} text={value.old} />,
              <ValueText key="new" value={value} text={value.new} />,
            ],
          }))}
        />
      ) : (
        <p className="text-ink-2">No value changed with this event.</p>
      )}
    </div>
  )
}

function factsOf(event: AuditEvent) {
  const local = formatLocalInstant(event.receivedAt, event.localOffset)
  const facts = [
    {
      term: 'Record',
      value: [auditRecordLabel(event.recordType), recordInWords(event)].filter(Boolean).join(', '),
    },
    { term: 'Who', value: [event.personName, standingOf(event)].filter(Boolean).join(', ') },
    { term: 'When', value: <InstantText at={event.receivedAt} precision="second" /> },
    { term: 'Clock of the person', value: local ?? 'not known' },
  ]
  if (event.collectedAt)
    facts.push({ term: 'Observed', value: <InstantText at={event.collectedAt} /> })
  if (event.enteredAt) facts.push({ term: 'Typed', value: <InstantText at={event.enteredAt} /> })
  if (event.reason !== null || event.reasonHidden)
    facts.push({
      term: 'Why',
      value: event.reason ?? 'hidden, because it may repeat a hidden value',
    })
  facts.push({ term: 'Hash', value: <CopyableHash value={event.hash} label="hash of the event" /> })
  return facts
}

function ValueText({ value, text }: { value: AuditValue; text: string | null }) {
  if (value.redacted) return <span className="text-ink-2">blanked by redaction</span>
  if (value.hidden) return <span className="text-ink-2">hidden from your role</span>
  if (text === null) return <span className="text-ink-2">nothing</span>
  return <span className="font-mono text-[14px] break-words whitespace-pre-wrap">{text}</span>
}
