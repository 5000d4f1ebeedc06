import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { z } from 'zod'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import type { AnalysisParameters } from '#shared/schemas/analysis.ts'
import { words } from '#shared/schemas/common.ts'
import { may, useStudy } from '../../api/study.ts'
import { Form } from '../../forms/Form.tsx'
import { TextField } from '../../forms/TextField.tsx'
import { Button } from '../../ui/Button.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { useAskForRun, useRunAnalysis } from './analyses.api.ts'

type StoreAnalysisProps = {
  datasetId: string
  parameters: AnalysisParameters
  suggestedTitle: string
}

const titled = z.object({ title: words(200) })

/** Runs on the server what is on the screen and stores it; says plainly that nothing is stored yet. */
export function StoreAnalysis({ datasetId, parameters, suggestedTitle }: StoreAnalysisProps) {
  const study = useStudy()
  const navigate = useNavigate()
  const run = useRunAnalysis(study.id)
  const ask = useAskForRun(study.id)
  const takesAWhile = drawsOf(parameters) !== null
  const [open, setOpen] = useState(false)
  const [id] = useState(() => crypto.randomUUID())
  const close = () => setOpen(false)
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 print:hidden">
      {may(study, 'analysis.run') ? (
        <>
          <Button onClick={() => setOpen(true)}>Store this analysis</Button>
          <p className="text-sm text-ink-2">
            Nothing on this page is stored yet. Only stored analyses go into reports.
          </p>
        </>
      ) : (
        <p className="text-sm text-ink-2">
          Nothing on this page is stored. An analyst of the study can store it.
        </p>
      )}
      <Dialog open={open} title="Store this analysis" onClose={close}>
        <p className="mb-4">
          The server computes it again from the frozen rows and keeps the result with everything
          that it takes to repeat it. A stored analysis cannot be changed or removed.
          {takesAWhile && ' It draws random samples, so it may take a moment.'}
        </p>
        <Form
          schema={titled}
          defaultValues={{ title: suggestedTitle }}
          submitLabel="Store it"
          busyLabel="Storing…"
          guard={false}
          onSubmit={async ({ title }) => {
            const request = { id, datasetId, title, parameters }
            await (takesAWhile ? ask : run).mutateAsync(request)
          }}
          onSaved={() => navigate(`/studies/${study.id}/results/${id}`)}
          onCancel={close}
        >
          <TextField name="title" label="Title" />
        </Form>
      </Dialog>
    </div>
  )
}
