import { useCallback, useId, useMemo } from 'react'
import { defaultSettings } from '#shared/breath/settings/defaultSettings.ts'
import type { Exhalation } from '#shared/breath/TraceResult.ts'
import { ExhalationTrace } from '#shared/figures/ExhalationTrace.tsx'
import { exhalationTraceTable } from '#shared/figures/exhalationTraceTable.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { classes } from '../../ui/classes.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import { ExhalationVerdict } from './ExhalationVerdict.tsx'
import { gasWords } from './gasWords.ts'
import type { ExhalationCurve } from './traceOf.ts'

type ExhalationRowProps = {
  exhalation: Exhalation
  curve: ExhalationCurve
  /** Which gas of the trace. */
  gasAt: number
  provenance: readonly string[]
}

/** One exhalation: its number, its curve, its verdict and then its values. */
export function ExhalationRow({ exhalation, curve, gasAt, provenance }: ExhalationRowProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 250, most: 620, first: 430 })
  const { number, startS, durationS, window } = exhalation
  const reading = exhalation.readings[gasAt]!
  const gas = useMemo(() => ({ label: gasWords(reading.analyte), unit: 'ppb' }), [reading.analyte])
  const samples = useMemo(() => samplesOf(curve, gasAt), [curve, gasAt])
  const table = useCallback(
    () => exhalationTraceTable({ number, samples, gas }),
    [number, samples, gas],
  )
  return (
    <section
      aria-label={`Exhalation ${formatCount(number)}`}
      className="grid rounded-[3px] border border-rule tablet:grid-cols-[92px_minmax(0,1fr)_minmax(210px,0.62fr)]"
    >
      <div className="border-copper bg-margin px-3.5 py-3 max-tablet:flex max-tablet:items-baseline max-tablet:gap-3 max-tablet:border-b max-tablet:py-2 tablet:border-r">
        <p className="text-[34px] leading-none font-bold tracking-tight">{formatCount(number)}</p>
        <p className="text-xs leading-[1.45] text-ink-2 tablet:mt-2">
          at {formatConcentration(startS, 4)} s, <br className="max-tablet:hidden" />
          {formatConcentration(durationS, 3)} s long
        </p>
      </div>
      <div className="min-w-0 p-3">
        <div ref={ref}>
          <figure style={{ maxWidth: width }}>
            <ExhalationTrace
              id={`${id}-trace`}
              number={number}
              samples={samples}
              gas={gas}
              plateau={window}
              accepted={reading.accepted}
              gapS={defaultSettings.gapS}
              width={width}
              theme={theme}
            />
          </figure>
          <FigureNumbers
            summary="The curve in numbers"
            table={table}
            provenance={provenance}
            fileName={`exhalation-${number}`}
          />
        </div>
      </div>
      <div
        className={classes('min-w-0 border-rule px-4 py-3', 'max-tablet:border-t tablet:border-l')}
      >
        <ExhalationVerdict exhalation={exhalation} reading={reading} />
      </div>
    </section>
  )
}

function samplesOf({ timeS, co2Percent, gases }: ExhalationCurve, gasAt: number) {
  return Array.from(timeS, (time, index) => {
    const gas = gases[gasAt]![index]!
    return {
      timeS: time,
      co2Percent: co2Percent[index]!,
      gas: Number.isFinite(gas) ? gas : null,
    }
  })
}
