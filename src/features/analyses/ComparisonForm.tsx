import { useFormContext } from 'react-hook-form'
import { z } from 'zod'
import { words } from '#shared/schemas/common.ts'
import type { ComparisonParameters } from '#shared/schemas/comparison.ts'
import type { Dataset, DatasetGroups } from '#shared/schemas/dataset.ts'
import { resampling, USUAL_RESAMPLING } from '#shared/schemas/resampling.ts'
import { SESSION_RULE_LABELS } from '#shared/terms/analysis.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { DIRECTION_LABELS, DIRECTIONS, type Direction } from '#shared/terms/protocol.ts'
import { CheckField } from '../../forms/CheckField.tsx'
import { FieldRow } from '../../forms/FieldRow.tsx'
import { Form } from '../../forms/Form.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { TextField } from '../../forms/TextField.tsx'
import { plannedDirection } from './explorerSettings.ts'

const choice = z.object({
  chosen: z.boolean(),
  direction: z.enum(DIRECTIONS, { error: 'Please choose a direction.' }),
})
const division = z.string({ error: 'Please choose what divides the subjects.' })
const group = z.string({ error: 'Please choose a group.' })

/** What the form holds; only the chosen design is looked at. */
const comparisonChoice = z
  .object({
    title: words(200),
    design: z.enum(['paired', 'independent']),
    sessionRule: z.enum(['first', 'mean', 'median']),
    markers: z.record(z.string(), choice),
    adjust: z.boolean(),
    permute: z.boolean(),
    seed: resampling.shape.seed,
    replicates: resampling.shape.replicates,
    analyteKey: z.string(),
    direction: z.enum(DIRECTIONS),
    by: division.optional(),
    first: group.optional(),
    second: group.optional(),
  })
  .superRefine((values, context) => {
    const refuse = (path: string, message: string) =>
      context.addIssue({ code: 'custom', path: [path], message })
    if (values.design === 'paired') {
      const chosen = Object.values(values.markers).filter((each) => each.chosen).length
      if (chosen < 2 || chosen > 4)
        refuse('design', `Choose two to four biomarkers; ${chosen} are chosen.`)
      return
    }
    if (!values.by) refuse('by', 'Please choose what divides the subjects.')
    if (!values.first) refuse('first', 'Please choose a group.')
    if (!values.second) refuse('second', 'Please choose a group.')
    else if (values.first === values.second)
      refuse('second', 'Choose another group than the first.')
  })
type ComparisonChoice = z.infer<typeof comparisonChoice>

type ComparisonFormProps = {
  dataset: Dataset
  groups: DatasetGroups
  onStore: (title: string, parameters: ComparisonParameters) => Promise<string>
  onStored: (id: string) => unknown
}

const divisionName = ({ by }: DatasetGroups[number]) =>
  by.kind === 'covariate' ? by.name : by.kind === 'site' ? 'Site' : 'Sex'

/** Others are compared with the primary biomarker, so it comes first. */
function primaryFirst({ manifest, protocol }: Dataset): Dataset['manifest']['analytes'] {
  const isPrimary = ({ key }: { key: string }) => key === protocol.primaryAnalyteKey
  return [
    ...manifest.analytes.filter(isPrimary),
    ...manifest.analytes.filter((each) => !isPrimary(each)),
  ]
}

/** Which areas to compare, in the same subjects or in two groups; computed and stored in one. */
export function ComparisonForm({ dataset, groups, onStore, onStored }: ComparisonFormProps) {
  const analytes = primaryFirst(dataset)
  const directionOf = (key: string): Direction => plannedDirection(dataset, key) ?? 'higher'
  const first = analytes[0]?.key ?? ''
  const defaults: ComparisonChoice = {
    title: `Comparison against ${dataset.protocol.targetCondition}`,
    design: analytes.length > 1 ? 'paired' : 'independent',
    sessionRule: 'first',
    markers: Object.fromEntries(
      analytes.map(({ key }, at) => [key, { chosen: at < 2, direction: directionOf(key) }]),
    ),
    adjust: true,
    permute: true,
    ...USUAL_RESAMPLING,
    analyteKey: first,
    direction: directionOf(first),
  }
  return (
    <Form
      schema={comparisonChoice}
      defaultValues={defaults}
      submitLabel="Compute and store"
      busyLabel="Asking…"
      guard={false}
      onSubmit={(values) => onStore(values.title, parametersOf(values, groups))}
      onSaved={onStored}
    >
      <TextField name="title" label="Title" />
      <RadioField
        name="design"
        label="What to compare"
        options={[
          { value: 'paired', label: 'Several biomarkers in the same subjects' },
          { value: 'independent', label: 'One biomarker in two groups of subjects' },
        ]}
      />
      <SelectField
        name="sessionRule"
        label="Several sessions of a subject"
        options={(['first', 'mean', 'median'] as const).map((value) => ({
          value,
          label: SESSION_RULE_LABELS[value],
        }))}
      />
      <Design dataset={dataset} groups={groups} />
    </Form>
  )
}

function Design({ dataset, groups }: Pick<ComparisonFormProps, 'dataset' | 'groups'>) {
  const { watch } = useFormContext<ComparisonChoice>()
  return watch('design') === 'paired' ? (
    <PairedFields dataset={dataset} permute={watch('permute')} />
  ) : (
    <GroupFields dataset={dataset} groups={groups} by={watch('by')} />
  )
}

const directions = DIRECTIONS.map((value) => ({ value, label: DIRECTION_LABELS[value] }))

function PairedFields({ dataset, permute }: { dataset: Dataset; permute: boolean }) {
  return (
    <>
      <FormSection title="Biomarkers, two to four">
        {primaryFirst(dataset).map(({ key, name }) => (
          <FieldRow key={key}>
            <CheckField name={`markers.${key}.chosen`} label={name} />
            <SelectField
              name={`markers.${key}.direction`}
              label={`Direction of ${name}`}
              options={directions}
            />
          </FieldRow>
        ))}
      </FormSection>
      <FormSection title="Tests">
        <CheckField
          name="adjust"
          label="More than one of these comparisons is primary"
          hint="Their p values are then adjusted after Holm."
        />
        <CheckField
          name="permute"
          label="Also test the whole curves by permutation"
          hint="Venkatraman’s test; it takes a moment."
        />
        {permute && (
          <FieldRow>
            <NumberField name="seed" label="Seed" />
            <NumberField name="replicates" label="Permutations" />
          </FieldRow>
        )}
      </FormSection>
    </>
  )
}

type GroupFieldsProps = Pick<ComparisonFormProps, 'dataset' | 'groups'> & { by: string | undefined }

function GroupFields({ dataset, groups, by }: GroupFieldsProps) {
  const divided = groups[Number(by)]
  const options = (divided?.groups ?? []).map(({ group: value, subjects }) => ({
    value,
    label: `${value} (${formatCount(subjects)} subjects)`,
  }))
  return (
    <FormSection title="Biomarker and groups">
      <FieldRow>
        <SelectField
          name="analyteKey"
          label="Biomarker"
          options={dataset.manifest.analytes.map(({ key, name }) => ({ value: key, label: name }))}
        />
        <SelectField name="direction" label="Direction" options={directions} />
      </FieldRow>
      <SelectField
        name="by"
        label="Subjects divided by"
        {...(groups.length === 0 ? { hint: 'Nothing divides these subjects.' } : {})}
        options={groups.map((each, at) => ({ value: String(at), label: divisionName(each) }))}
      />
      <FieldRow>
        <SelectField name="first" label="First group" options={options} />
        <SelectField name="second" label="Second group" options={options} />
      </FieldRow>
    </FormSection>
  )
}

function parametersOf(values: ComparisonChoice, groups: DatasetGroups): ComparisonParameters {
  const { design, sessionRule, adjust, permute, seed, replicates } = values
  const common = { kind: 'comparison' as const, sessionRule, confidence: 0.95 }
  if (design === 'paired')
    return {
      ...common,
      compare: {
        design,
        markers: Object.entries(values.markers)
          .filter(([, { chosen }]) => chosen)
          .map(([analyteKey, { direction }]) => ({ analyteKey, direction })),
        adjust,
        permutations: permute ? { seed, replicates } : null,
      },
    }
  return {
    ...common,
    compare: {
      design,
      marker: { analyteKey: values.analyteKey, direction: values.direction },
      by: groups[Number(values.by)]!.by,
      groups: [values.first!, values.second!],
    },
  }
}
