import { useMemo } from 'react'
import type { Duty } from '#shared/policy/people.ts'
import type { Member } from '#shared/schemas/member.ts'
import { DUTY_LABELS, ROLE_LABELS } from '#shared/terms/team.ts'
import { DataTable } from '../../ui/DataTable.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { LinkButton } from '../../ui/LinkButton.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

type MembersTableProps = {
  caption: string
  members: readonly Member[] | undefined
  /** Lines that have ended show when and why. */
  ended?: boolean
  status?: { isPending: boolean; isFetching: boolean; error: Error | null; refetch: () => unknown }
  /** Whose own line nobody can end. */
  readerId: string | undefined
  onEnd?: (member: Member) => void
}

/** Lines of the team list. */
export function MembersTable(props: MembersTableProps) {
  const { members, ended = false, readerId, onEnd } = props
  const columns = useMemo(() => columnsFor(ended, readerId, onEnd), [ended, readerId, onEnd])
  return (
    <DataTable
      caption={props.caption}
      hideCaption
      columns={columns}
      rows={members}
      rowId={(member) => member.id}
      status={props.status}
      empty={<EmptyPlace title="Nobody yet" />}
    />
  )
}

function columnsFor(
  ended: boolean,
  readerId: string | undefined,
  onEnd: ((member: Member) => void) | undefined,
): TableColumn<Member>[] {
  const columns: TableColumn<Member>[] = [
    {
      id: 'person',
      header: 'Person',
      value: (member) => member.personName,
      cell: (member) => (
        <>
          {member.personName}
          {member.personId === readerId && <span className="text-ink-2"> (you)</span>}
        </>
      ),
    },
    { id: 'role', header: 'Role', value: placeOf },
    { id: 'site', header: 'Where', value: (member) => member.siteName ?? 'The whole study' },
    {
      id: 'since',
      header: 'Since',
      value: (member) => member.startsAt,
      cell: (member) => <InstantText at={member.startsAt} precision="day" />,
    },
  ]
  if (ended)
    columns.push(
      {
        id: 'until',
        header: 'Until',
        value: (member) => member.endsAt,
        cell: (member) => member.endsAt && <InstantText at={member.endsAt} precision="day" />,
      },
      { id: 'why', header: 'Why', value: (member) => member.endReason },
    )
  else if (onEnd)
    columns.push({
      id: 'end',
      header: 'End',
      hideHeader: true,
      value: () => null,
      cell: (member) =>
        member.personId === readerId ? null : (
          <LinkButton onClick={() => onEnd(member)}>
            End<span className="sr-only"> the place of {member.personName}</span>
          </LinkButton>
        ),
    })
  return columns
}

/** "Coordinator, study lead" */
export function placeOf({ role, duty }: Pick<Member, 'role' | 'duty'>): string {
  const label = ROLE_LABELS[role]
  return duty ? `${label}, ${DUTY_LABELS[duty as Duty].toLowerCase()}` : label
}
