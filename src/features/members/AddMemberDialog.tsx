import { useQuery } from '@tanstack/react-query'
import { useWatch } from 'react-hook-form'
import { DUTIES_OF_ROLE, ROLES, type Role, type StudyKind } from '#shared/policy/people.ts'
import { type MemberInput, memberInput, type Person } from '#shared/schemas/member.ts'
import { DUTY_LABELS, ROLE_LABELS } from '#shared/terms/team.ts'
import { Form } from '../../forms/Form.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { ErrorNotice } from '../../ui/ErrorNotice.tsx'
import { Skeleton } from '../../ui/Skeleton.tsx'
import { peopleQuery, useAddMember } from './members.api.ts'

const ROLE_HINTS: Record<Role, string> = {
  coordinator: 'Brings data in, answers for them; without a site leads the study.',
  monitor: 'Reads and checks; approves the lock; receives the closed part of a report.',
  analyst: 'Runs the analyses on locked data and issues reports.',
}

type AddMemberDialogProps = {
  studyId: string
  kind: StudyKind
  sites: readonly { id: string; name: string }[]
  readerId: string | undefined
  open: boolean
  onClose: () => void
}

/** Adds a line to the team list. */
export function AddMemberDialog(props: AddMemberDialogProps) {
  const { studyId, kind, sites, readerId, open, onClose } = props
  const people = useQuery({ ...peopleQuery(studyId), enabled: open })
  const add = useAddMember(studyId)
  return (
    <Dialog open={open} title="Add somebody to the team" onClose={onClose} wide>
      {people.error && <ErrorNotice what="The people could not be read" error={people.error} />}
      {people.isPending && <Skeleton lines={4} />}
      {people.data && (
        <Form
          schema={memberInput}
          defaultValues={blankLine()}
          submitLabel="Add to the team"
          busyLabel="Adding…"
          onSubmit={(values) => add.mutateAsync(values)}
          onSaved={onClose}
          onCancel={onClose}
        >
          <LineFields
            kind={kind}
            sites={sites}
            people={people.data.filter((person) => person.id !== readerId)}
          />
        </Form>
      )}
    </Dialog>
  )
}

type LineFieldsProps = {
  kind: StudyKind
  sites: readonly { id: string; name: string }[]
  people: readonly Person[]
}

function LineFields({ kind, sites, people }: LineFieldsProps) {
  const [personId, role] = useWatch<MemberInput, ['personId', 'role']>({
    name: ['personId', 'role'],
  })
  const person = people.find((each) => each.id === personId)
  return (
    <>
      <SelectField
        name="personId"
        label="Person"
        hint="Somebody is listed here once they have signed in to Breathmark with their hospital account."
        options={people.map(({ id, name }) => ({ value: id, label: name }))}
      />
      <RadioField
        name="role"
        label="Role in this study"
        hint="One person has one role in a study, ever."
        options={ROLES.filter((each) => !person || person.roles.includes(each)).map((value) => ({
          value,
          label: ROLE_LABELS[value],
          hint: ROLE_HINTS[value],
        }))}
      />
      {kind === 'prospective' && role && DUTIES_OF_ROLE[role].length > 0 && (
        <SelectField
          name="duty"
          label="Duty"
          optional="null"
          options={DUTIES_OF_ROLE[role].map((value) => ({ value, label: DUTY_LABELS[value] }))}
        />
      )}
      {role === 'coordinator' && (
        <SelectField
          name="siteId"
          label="Site"
          optional="null"
          hint="Somebody at a site sees the data of that site alone."
          placeholder="The whole study"
          options={sites.map(({ id, name }) => ({ value: id, label: name }))}
        />
      )}
    </>
  )
}

const blankLine = () => ({
  id: crypto.randomUUID(),
  personId: '',
  role: undefined,
  duty: null,
  siteId: null,
})
