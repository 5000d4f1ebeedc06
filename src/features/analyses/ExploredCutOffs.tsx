import { useState } from 'react'
import type { CutOffCorrections } from '#shared/schemas/accuracyMore.ts'
import type { RuleCutOffs } from '#shared/schemas/analysis.ts'
import type { DatasetValues } from '#shared/schemas/dataset.ts'
import { type ResamplingChoice, USUAL_RESAMPLING } from '#shared/schemas/resampling.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import { BesideProgress } from '../../ui/BesideProgress.tsx'
import { Button } from '../../ui/Button.tsx'
import { useBeside } from '../../ui/useBeside.ts'
import { ChosenCutOffs } from './ChosenCutOffs.tsx'
import type { CorrectionOrder } from './corrections.worker.ts'

type ExploredCutOffsProps = {
  rules: readonly RuleCutOffs[]
  values: DatasetValues
  direction: Direction
  resampling: ResamplingChoice | null
  unit: string
}

const startWorker = () =>
  new Worker(new URL('./corrections.worker.ts', import.meta.url), { type: 'module' })

/** The chosen cut-offs while exploring; they are corrected in this browser on request. */
export function ExploredCutOffs(props: ExploredCutOffsProps) {
  const { rules, values, direction, unit } = props
  const resampling = props.resampling ?? USUAL_RESAMPLING
  const [wanted, setWanted] = useState(false)
  const { present, absent, presentSubjects } = values
  const order: CorrectionOrder | null =
    wanted && rules.length > 0
      ? { values: { present, absent, presentSubjects }, direction, resampling }
      : null
  const beside = useBeside<CorrectionOrder, CutOffCorrections>(
    order,
    `${values.analyteKey} ${values.sessionRule} ${direction} ${resampling.seed} ${resampling.replicates}`,
    startWorker,
  )
  const corrections = order && beside.state === 'done' ? beside.outcome : undefined
  return (
    <ChosenCutOffs rules={rules} corrections={corrections} unit={unit}>
      {!wanted && (
        <div className="mt-3 print:hidden">
          <Button kind="quiet" size="small" onClick={() => setWanted(true)}>
            Correct them: {formatCount(resampling.replicates)} samples, seed {resampling.seed}
          </Button>
        </div>
      )}
      {order && beside.state !== 'done' && (
        <div className="mt-3">
          <BesideProgress label="Drawing samples in this browser" work={beside} />
        </div>
      )}
    </ChosenCutOffs>
  )
}
