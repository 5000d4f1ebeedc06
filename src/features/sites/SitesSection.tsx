import { useFieldArray } from 'react-hook-form'
import { FieldList, FieldListEntry } from '../../forms/FieldList.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { SiteFields } from './SiteFields.tsx'

export const BLANK_SITE = { name: '', prefix: '', plannedSubjects: null }

/** The sites of a study that is being set up. */
export function SitesSection() {
  const { fields, append, remove } = useFieldArray({ name: 'sites', keyName: 'rowKey' })
  return (
    <FormSection title="Sites">
      <p className="-mt-3 max-w-[70ch] text-sm text-ink-2">
        A prefix is two to four capital letters or digits that begin with a letter, without I and O.
        Every subject code of the site begins with it, so it cannot change later.
      </p>
      <FieldList
        name="sites"
        label="Sites"
        add={{ label: 'Add another site', onAdd: () => append(BLANK_SITE) }}
      >
        {fields.map((field, index) => (
          <FieldListEntry
            key={field.rowKey}
            label={`Site ${index + 1}`}
            onRemove={fields.length > 1 ? () => remove(index) : undefined}
          >
            <SiteFields at={`sites.${index}.`} />
          </FieldListEntry>
        ))}
      </FieldList>
    </FormSection>
  )
}
