import { useCallback, useId } from 'react'
import { PlanCurve } from '#shared/figures/PlanCurve.tsx'
import { planCurveTable } from '#shared/figures/planCurveTable.ts'
import type { PlanCurveData } from '#shared/figures/planCurveTypes.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'

type PlanCurvePanelProps = { curve: PlanCurveData; provenance: readonly string[] }

/** How the answer moves with the assumption that it depends on most, and the numbers behind it. */
export function PlanCurvePanel({ curve, provenance }: PlanCurvePanelProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLElement>({ least: 280, most: 620, first: 520 })
  const table = useCallback(() => planCurveTable(curve), [curve])
  return (
    <section
      aria-labelledby={`${id}-title`}
      ref={ref}
      className="min-w-0 print:max-w-[115mm] print:break-inside-avoid"
    >
      <h2 id={`${id}-title`}>{curve.title}</h2>
      <figure style={{ maxWidth: width }} className="mb-3">
        <PlanCurve id={`${id}-curve`} curve={curve} width={width} theme={theme} />
      </figure>
      <div className="print:hidden">
        <FigureNumbers
          summary="The curve in numbers"
          table={table}
          provenance={provenance}
          fileName="plan"
        />
      </div>
    </section>
  )
}
