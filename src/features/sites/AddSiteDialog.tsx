import { siteInput } from '#shared/schemas/site.ts'
import { Form } from '../../forms/Form.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { SiteFields } from './SiteFields.tsx'
import { BLANK_SITE } from './SitesSection.tsx'
import { useAddSite } from './sites.api.ts'

type AddSiteDialogProps = { studyId: string; open: boolean; onClose: () => void }

export function AddSiteDialog({ studyId, open, onClose }: AddSiteDialogProps) {
  const add = useAddSite(studyId)
  return (
    <Dialog open={open} title="Add a site" onClose={onClose} wide>
      <Form
        schema={siteInput}
        defaultValues={BLANK_SITE}
        submitLabel="Add the site"
        busyLabel="Adding…"
        onSubmit={(values) => add.mutateAsync(values)}
        onSaved={onClose}
        onCancel={onClose}
      >
        <p className="max-w-[70ch] text-sm text-ink-2">
          The prefix is two to four capital letters or digits that begin with a letter, without I
          and O. Every subject code of the site begins with it, so it cannot change later.
        </p>
        <SiteFields />
      </Form>
    </Dialog>
  )
}
