import { FIGURE_FONT_SIZE } from './FigureCanvas.tsx'
import { figureNumber as n } from './figureGeometry.ts'
import type { FigureTheme } from './figureTheme.ts'
import { type MarkShape, markPath } from './markPaths.ts'
import { fitText, textWidth } from './textWidth.ts'

/** One line of the key under a plot. */
export interface KeyEntry {
  label: string
  /** Numbers beside the label. */
  value?: string
  colour: string
  dash?: string
  strokeWidth?: number
  mark?: MarkShape
}

const ROW = 20
const SAMPLE = 34
/** Where the words begin, after the sample. */
const WORDS = SAMPLE + 10
const GAP = 14

/** Height of the key at a width, both in figure units. */
export function keyHeight(entries: readonly KeyEntry[], width: number): number {
  return rowTops(entries, width).at(-1) ?? 0
}

/** Numbers stand beside their label where all labels have room for it, and under it elsewhere. */
function isStacked(entries: readonly KeyEntry[], width: number): boolean {
  return widestLabel(entries) + GAP + widestValue(entries) > width - WORDS
}

/** Top of each row, and last of all the foot of the key. */
function rowTops(entries: readonly KeyEntry[], width: number): number[] {
  const stacked = isStacked(entries, width)
  const tops = [0]
  for (const { value } of entries) tops.push(tops.at(-1)! + (stacked && value ? ROW + 17 : ROW))
  return tops
}

function widestLabel(entries: readonly KeyEntry[]): number {
  return Math.max(0, ...entries.map(({ label }) => textWidth(label, FIGURE_FONT_SIZE)))
}

function widestValue(entries: readonly KeyEntry[]): number {
  return Math.max(0, ...entries.map(({ value }) => textWidth(value ?? '', FIGURE_FONT_SIZE)))
}

/** Names the lines of a plot under it, each with a sample of its dash and mark. */
export function FigureKey(props: {
  entries: readonly KeyEntry[]
  left: number
  top: number
  right: number
  theme: FigureTheme
}) {
  const { entries, left, top, right, theme } = props
  const width = right - left
  const tops = rowTops(entries, width)
  const words = left + WORDS
  const stacked = isStacked(entries, width)
  const values = stacked ? { x: words, dy: 17 } : { x: words + widestLabel(entries) + GAP, dy: 0 }
  return (
    <g>
      {entries.map((entry, row) => {
        const y = top + tops[row]! + ROW / 2
        return (
          <g key={entry.label}>
            <KeySample entry={entry} left={left} y={y} theme={theme} />
            <text x={n(words)} y={n(y + 4)} fill={theme.ink}>
              {fitText(entry.label, right - words, FIGURE_FONT_SIZE)}
            </text>
            {entry.value && (
              <text x={n(values.x)} y={n(y + 4 + values.dy)}>
                {entry.value}
              </text>
            )}
          </g>
        )
      })}
    </g>
  )
}

function KeySample(props: { entry: KeyEntry; left: number; y: number; theme: FigureTheme }) {
  const { entry, left, y, theme } = props
  return (
    <>
      <path
        d={`M${n(left)} ${n(y)}h${SAMPLE}`}
        fill="none"
        stroke={entry.colour}
        strokeWidth={entry.strokeWidth ?? 2}
        strokeDasharray={entry.dash}
      />
      {entry.mark && (
        <path
          d={markPath(entry.mark, { x: left + SAMPLE / 2, y }, 4.2)}
          fill={theme.surface}
          stroke={entry.colour}
          strokeWidth="1.6"
        />
      )}
    </>
  )
}
