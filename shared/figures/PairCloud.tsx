import { formatCount } from '../terms/numbers.ts'
import type { FigureTheme } from './figureTheme.ts'
import { markPath, marksPath } from './markPaths.ts'
import type { PairMarks } from './pairMarks.ts'

/** Pairs of readings as rings, or as discs by number where there are thousands. */
export function PairCloud({ marks, theme }: { marks: PairMarks; theme: FigureTheme }) {
  const colour = theme.series[0]
  if (marks.rings.length > 0) {
    return (
      <path
        d={marksPath('disc', marks.rings, marks.ringRadius)}
        fill="none"
        stroke={colour}
        strokeWidth="1.2"
      />
    )
  }
  const discs = marks.discs.map(({ point, radius }) => markPath('disc', point, radius))
  return <path d={discs.join('')} fill={colour} />
}

/** What the discs mean; nothing where each pair has its own ring. */
export function pairMarkWords({ discs, mostPairs }: PairMarks): string | null {
  if (discs.length === 0) return null
  return `A larger disc stands for more pairs, the largest for ${formatCount(mostPairs)}`
}
