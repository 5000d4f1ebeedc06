import { useCallback, useId, useMemo } from 'react'
import { AllanPlot } from '#shared/figures/AllanPlot.tsx'
import { allanTable } from '#shared/figures/allanTable.ts'
import type { AllanPoint } from '#shared/statistics/sensor/allanDeviation.ts'
import { allanMinimum } from '#shared/statistics/sensor/allanMinimum.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import { atInterval } from './allanOf.ts'
import { amount } from './calibrationWords.ts'

type AllanResultProps = {
  n: number
  points: readonly AllanPoint[]
  intervalS: number
  unit: string | undefined
  provenance: readonly string[]
}

/** A deviation that rests on fewer differences than this is a rough one. */
const FEW_TERMS = 10

/** The deviation over averaging time, its minimum, and what to make of it. */
export function AllanResult({ n, points, intervalS, unit, provenance }: AllanResultProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 680, first: 560 })
  const timed = useMemo(() => atInterval(points, intervalS), [points, intervalS])
  const least = allanMinimum(timed)
  const table = useCallback(() => allanTable({ points: timed, unit }), [timed, unit])
  return (
    <div ref={ref}>
      <h2>Smallest after averaging for {formatConcentration(least.tauS)} s</h2>
      <p className="mb-2">
        The Allan deviation is then {amount(least.deviation, unit)}, from {formatCount(n)} readings{' '}
        {formatConcentration(intervalS)} s apart.
      </p>
      <figure style={{ maxWidth: width }} className="mb-2">
        <AllanPlot
          id={`${id}-allan`}
          points={timed}
          minimum={least}
          {...(unit ? { unit } : {})}
          width={width}
          theme={theme}
        />
      </figure>
      {notesOn(least, timed).map((note) => (
        <p key={note} className="mb-2 text-sm text-ink-2">
          {note}
        </p>
      ))}
      <div className="mt-4">
        <FigureNumbers
          summary="The deviations in numbers"
          table={table}
          provenance={provenance}
          fileName="allan-deviation"
        />
      </div>
    </div>
  )
}

function notesOn(least: AllanPoint, points: readonly AllanPoint[]): string[] {
  const atEnd = least === points.at(-1)
  return [
    ...(atEnd
      ? ['The deviation still falls at the longest time: record for longer to find the minimum.']
      : [
          'Averaging for longer gathers drift. At the bedside average no longer than the plateau of an exhalation lasts.',
        ]),
    ...(least.terms < FEW_TERMS
      ? [`Only ${formatCount(least.terms)} differences stand behind the minimum, so it is rough.`]
      : []),
    ...(points.some(({ deviation }) => deviation === 0)
      ? ['A deviation of 0 has no place on the log scale and is left out of the figure.']
      : []),
  ]
}
