import { useState } from 'react'
import { type Analyte, type AnalyteInput, analyteInput } from '#shared/schemas/protocol.ts'
import { Form } from '../../forms/Form.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { AnalyteFields } from './AnalyteFields.tsx'
import { AnalytePicker } from './AnalytePicker.tsx'
import { useAddAnalyte } from './analytes.api.ts'

type AddAnalyteDialogProps = {
  studyId: string
  analytes: readonly Analyte[]
  open: boolean
  onClose: () => void
}

/** Adds an analyte to a study that stands: first which one, then its unit. */
export function AddAnalyteDialog({ studyId, analytes, open, onClose }: AddAnalyteDialogProps) {
  const [picked, setPicked] = useState<AnalyteInput | null>(null)
  const add = useAddAnalyte(studyId)
  const close = () => {
    setPicked(null)
    onClose()
  }
  return (
    <Dialog open={open} title="Add an analyte" onClose={close} wide>
      {picked === null ? (
        <AnalytePicker taken={analytes.map((analyte) => analyte.key)} onPick={setPicked} />
      ) : (
        <Form
          schema={analyteInput}
          defaultValues={picked}
          submitLabel="Add the analyte"
          busyLabel="Adding…"
          onSubmit={(values) => add.mutateAsync(values)}
          onSaved={close}
          onCancel={() => setPicked(null)}
          cancelLabel="Choose another"
        >
          <AnalyteFields analyteKey={picked.key} />
        </Form>
      )}
    </Dialog>
  )
}
