import { useState } from 'react'
import { type Site, siteCorrection } from '#shared/schemas/site.ts'
import { ChangedMeanwhile, isChangedMeanwhile } from '../../forms/ChangedMeanwhile.tsx'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { SiteFields } from './SiteFields.tsx'
import { useCorrectSite } from './sites.api.ts'

const WHY = ['Typing mistake', 'The site was renamed', 'The plan changed']
const correction = siteCorrection.omit({ version: true })

type CorrectSiteDialogProps = {
  studyId: string
  /** The site as it stands now. */
  site: Site
  onClose: () => void
}

export function CorrectSiteDialog({ studyId, site, onClose }: CorrectSiteDialogProps) {
  const [seen] = useState(site)
  const correct = useCorrectSite(studyId)
  const mine = correct.variables?.body
  const overtaken = isChangedMeanwhile(correct.error) && site.version !== seen.version
  return (
    <Dialog open title={`Correct ${seen.name}`} onClose={onClose} wide>
      {overtaken && mine && (
        <ChangedMeanwhile
          what="this site"
          rows={[
            { label: 'Site', mine: mine.name, stored: site.name },
            {
              label: 'Planned subjects',
              mine: mine.plannedSubjects ?? 'none',
              stored: site.plannedSubjects ?? 'none',
            },
          ]}
          onKeepMine={() =>
            correct.mutate(
              { siteId: site.id, body: { ...mine, version: site.version } },
              { onSuccess: onClose },
            )
          }
          onKeepStored={onClose}
        />
      )}
      <Form
        schema={correction}
        defaultValues={{
          name: seen.name,
          plannedSubjects: seen.plannedSubjects,
          reasonForChange: '',
        }}
        submitLabel="Save the correction"
        guard={false}
        onSubmit={(values) =>
          correct.mutateAsync({ siteId: site.id, body: { ...values, version: seen.version } })
        }
        onSaved={onClose}
        onCancel={onClose}
      >
        <SiteFields prefixFixed />
        <ReasonField reasons={WHY} />
      </Form>
    </Dialog>
  )
}
