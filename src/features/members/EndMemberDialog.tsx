import { type Member, memberEnd } from '#shared/schemas/member.ts'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { placeOf } from './MembersTable.tsx'
import { useEndMember } from './members.api.ts'

const WHY = ['Left the study', 'Left the hospital', 'Added by mistake']

type EndMemberDialogProps = { studyId: string; member: Member; onClose: () => void }

/** Ends a place in the team from now on. */
export function EndMemberDialog({ studyId, member, onClose }: EndMemberDialogProps) {
  const end = useEndMember(studyId)
  return (
    <Dialog open title={`End the place of ${member.personName}?`} onClose={onClose}>
      <p className="mb-4">
        {placeOf(member)}, {member.siteName ?? 'the whole study'}. From now on this place opens
        nothing any more. It stays in the team list with today’s date, and so does everything that
        was done in it.
      </p>
      <Form
        schema={memberEnd}
        defaultValues={{ reasonForChange: '' }}
        submitLabel="End this place"
        busyLabel="Ending…"
        kind="danger"
        guard={false}
        onSubmit={(values) => end.mutateAsync({ memberId: member.id, body: values })}
        onSaved={onClose}
        onCancel={onClose}
      >
        <ReasonField label="Reason" reasons={WHY} />
      </Form>
    </Dialog>
  )
}
