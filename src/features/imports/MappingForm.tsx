import { useEffect, useState } from 'react'
import { useFormContext } from 'react-hook-form'
import { z } from 'zod'
import {
  type DataImport,
  DELIMITERS,
  type Delimiter,
  type ImportMapping,
  type ImportReading,
  importMapping,
} from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Site } from '#shared/schemas/site.ts'
import { DELIMITER_LABELS } from '#shared/terms/importColumn.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Form } from '../../forms/Form.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { classes } from '../../ui/classes.ts'
import { Segments } from '../../ui/Segments.tsx'
import { CompactField } from './CompactField.tsx'
import { usePreviewImport } from './imports.api.ts'
import { MAPPING_GRID, MappingRow } from './MappingRow.tsx'
import { fitsReading, type MappingDraft, mappingDefaults } from './mappingDefaults.ts'
import { SitePart } from './SitePart.tsx'
import { useTabDraft } from './useTabDraft.ts'

type MappingFormProps = {
  studyId: string
  of: DataImport
  reading: ImportReading
  analytes: readonly Analyte[]
  sites: readonly Site[]
  locked?: string
  onDelimiter: (delimiter: Delimiter) => void
  onChecking: () => void
}

const schema = z.object({ mapping: importMapping })

/** Says what the columns mean. Everything typed stays for this tab until the rows are checked. */
export function MappingForm(props: MappingFormProps) {
  const { studyId, of, reading, analytes, sites } = props
  const preview = usePreviewImport(studyId, of.id)
  const draft = useTabDraft<MappingDraft>(`import ${of.id} columns`)
  const [defaults] = useState(() =>
    draft.first && fitsReading(draft.first, reading) ? draft.first : mappingDefaults(of, reading),
  )
  return (
    <Form
      schema={schema}
      defaultValues={{ mapping: defaults }}
      submitLabel="Check all rows"
      busyLabel="Handing over…"
      guard={false}
      locked={props.locked}
      onSubmit={({ mapping }) =>
        preview.mutateAsync({ mapping: oneWayToSites(mapping), version: of.version })
      }
      onSaved={() => {
        draft.clear()
        props.onChecking()
      }}
    >
      <DraftKeeper keep={draft.keep} />
      <section className="flex flex-wrap gap-x-12 gap-y-4">
        <div>
          <p className="mb-1.5 text-[14px] font-semibold">Between the cells stands</p>
          <Segments
            label="Between the cells stands"
            hideLabel
            options={DELIMITERS.map((value) => ({ value, label: DELIMITER_LABELS[value] }))}
            value={reading.delimiter}
            onChange={props.onDelimiter}
          />
        </div>
        <RadioField
          name="mapping.format.decimal"
          label="Decimals are written"
          options={[
            { value: '.', label: 'with a point: 0.5' },
            { value: ',', label: 'with a comma: 0,5' },
          ]}
          inline
        />
      </section>
      <section aria-labelledby="import-columns">
        <h2 id="import-columns">What the columns mean</h2>
        <p className="mb-2 max-w-[75ch] text-ink-2">
          Suggested from the headings and the first {formatCount(reading.rowsRead)} rows. Columns
          that are left out never reach the study. Blank cells are missing values and stay missing.
        </p>
        <CompactField name="mapping.columns" label="Columns">
          {(control) => (
            <div id={control.id} tabIndex={-1}>
              <div aria-hidden="true" className="border-b border-rule-2 py-[7px] max-wide:hidden">
                <div className={classes(MAPPING_GRID, 'text-sm font-semibold text-ink-2')}>
                  <span>Heading</span>
                  <span>Some values</span>
                  <span>Means</span>
                  <span>And needs</span>
                </div>
              </div>
              <ul>
                {reading.columns.map((column, index) => (
                  <MappingRow key={column.name} index={index} column={column} analytes={analytes} />
                ))}
              </ul>
            </div>
          )}
        </CompactField>
      </section>
      <section aria-labelledby="import-sites">
        <h2 id="import-sites">Where the rows belong</h2>
        <SitePart reading={reading} sites={sites} />
      </section>
    </Form>
  )
}

/** Either a column names the sites or all rows belong to one; what was said for the other way stays behind. */
const oneWayToSites = (mapping: ImportMapping): ImportMapping =>
  mapping.columns.some((column) => column.meaning.as === 'site')
    ? { ...mapping, siteId: null }
    : { ...mapping, sitesByWord: {} }

/** Keeps what is being said, so that a reload loses nothing. */
function DraftKeeper({ keep }: { keep: (draft: MappingDraft) => void }) {
  const { subscribe } = useFormContext<{ mapping: MappingDraft }>()
  useEffect(
    () =>
      subscribe({
        formState: { values: true },
        callback: ({ values }) => keep(values.mapping),
      }),
    [subscribe, keep],
  )
  return null
}
