import { useState } from 'react'
import type { z } from 'zod'
import { type Site, siteCorrection } from '#shared/schemas/site.ts'
import { ChangedMeanwhile, isChangedMeanwhile } from '../../forms/ChangedMeanwhile.tsx'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { rebased } from '../../forms/rebased.ts'
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
  const [mine, setMine] = useState<z.output<typeof correction> | null>(null)
  const save = (values: z.output<typeof correction>) =>
    correct
      .mutateAsync({ siteId: site.id, body: { ...values, version: seen.version } })
      .catch((error) => {
        setMine(isChangedMeanwhile(error) ? values : null)
        throw error
      })
  const onTop = mine && site.version !== seen.version ? rebased(mine, seen, site) : null
  return (
    <Dialog open title={`Correct ${seen.name}`} onClose={onClose} wide>
      {onTop && (
        <ChangedMeanwhile
          what="this site"
          rows={[
            { label: 'Site', mine: onTop.name, stored: site.name },
            {
              label: 'Planned subjects',
              mine: onTop.plannedSubjects ?? 'none',
              stored: site.plannedSubjects ?? 'none',
            },
          ]}
          onKeepMine={() =>
            correct
              .mutateAsync({ siteId: site.id, body: { ...onTop, version: site.version } })
              .then(onClose)
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
        onSubmit={save}
        onSaved={onClose}
        onCancel={onClose}
      >
        <SiteFields prefixFixed />
        <ReasonField reasons={WHY} />
      </Form>
    </Dialog>
  )
}
