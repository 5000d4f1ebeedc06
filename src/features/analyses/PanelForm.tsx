import { z } from 'zod'
import { words } from '#shared/schemas/common.ts'
import type { Dataset } from '#shared/schemas/dataset.ts'
import type { PanelParameters } from '#shared/schemas/panel.ts'
import { resampling } from '#shared/schemas/resampling.ts'
import {
  PANEL_VALIDATION_LABELS,
  PANEL_VALIDATIONS,
  SESSION_RULE_LABELS,
} from '#shared/terms/analysis.ts'
import { CheckField } from '../../forms/CheckField.tsx'
import { FieldRow } from '../../forms/FieldRow.tsx'
import { Form } from '../../forms/Form.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { TextField } from '../../forms/TextField.tsx'

const panelChoice = z
  .object({
    title: words(200),
    chosen: z.record(z.string(), z.boolean()),
    scale: z.enum(['raw', 'log']),
    sessionRule: z.enum(['first', 'mean', 'median']),
    validation: z.enum(PANEL_VALIDATIONS),
    seed: resampling.shape.seed,
    replicates: resampling.shape.replicates,
  })
  .superRefine(({ chosen }, context) => {
    const many = Object.values(chosen).filter(Boolean).length
    if (many < 2 || many > 6)
      context.addIssue({
        code: 'custom',
        path: ['scale'],
        message: `A panel has two to six analytes; ${many} are chosen.`,
      })
  })

type PanelFormProps = {
  dataset: Dataset
  onStore: (title: string, parameters: PanelParameters) => Promise<string>
  onStored: (id: string) => unknown
}

/** Which gases make the panel, and how its flattery is taken off; computed and stored in one. */
export function PanelForm({ dataset, onStore, onStored }: PanelFormProps) {
  const { analytes } = dataset.manifest
  return (
    <Form
      schema={panelChoice}
      defaultValues={{
        title: `Panel against ${dataset.protocol.targetCondition}`,
        chosen: Object.fromEntries(analytes.map(({ key }, at) => [key, at < 2])),
        scale: 'log',
        sessionRule: 'first',
        validation: 'bootstrap',
        seed: 1,
        replicates: 200,
      }}
      submitLabel="Compute and store"
      busyLabel="Asking…"
      guard={false}
      onSubmit={({ title, chosen, seed, replicates, ...values }) =>
        onStore(title, {
          kind: 'panel',
          ...values,
          analyteKeys: analytes.map(({ key }) => key).filter((key) => chosen[key]),
          confidence: 0.95,
          resampling: { seed, replicates },
        })
      }
      onSaved={onStored}
    >
      <TextField name="title" label="Title" />
      <FormSection title="Analytes, two to six">
        {analytes.map(({ key, name }) => (
          <CheckField key={key} name={`chosen.${key}`} label={name} />
        ))}
      </FormSection>
      <RadioField
        name="scale"
        label="Values go in"
        options={[
          { value: 'log', label: 'As natural logarithms', hint: 'Usual for gas concentrations' },
          { value: 'raw', label: 'As they are' },
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
      <RadioField
        name="validation"
        label="How the area is corrected"
        hint="A panel is never shown with its apparent area alone."
        options={PANEL_VALIDATIONS.map((value) => ({
          value,
          label: PANEL_VALIDATION_LABELS[value],
        }))}
      />
      <FieldRow>
        <NumberField name="seed" label="Seed" />
        <NumberField name="replicates" label="Samples or repeats" />
      </FieldRow>
    </Form>
  )
}
