import type { ReactNode } from 'react'
import type { FigureTheme } from './figureTheme.ts'

/** What every figure takes. */
export interface FigureProps {
  /** Unique on the page: names the parts that a screen reader reads. */
  id: string
  /** Width in figure units; pass the width in CSS pixels and text is drawn at 12 pixels. */
  width?: number
  theme?: FigureTheme
}

/** Text is 12 units high; the maths font covers signs that Noto Sans lacks in the browser. */
export const FIGURE_FONT_SIZE = 12
const FIGURE_FONT = "'Noto Sans', 'Noto Sans Math', sans-serif"

/**
 * The frame of a figure: a fixed view box, a name and a description. Presentation attributes alone,
 * because style sheets do not reach the printed report.
 */
export function FigureCanvas(props: {
  id: string
  title: string
  description: string
  width: number
  height: number
  theme: FigureTheme
  children: ReactNode
}) {
  const { id, title, description, width, height, theme, children } = props
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      viewBox={`0 0 ${width} ${Math.ceil(height)}`}
      role="img"
      aria-labelledby={`${id}-title ${id}-description`}
      fontFamily={FIGURE_FONT}
      fontSize={FIGURE_FONT_SIZE}
      fill={theme.inkQuiet}
    >
      <title id={`${id}-title`}>{title}</title>
      <desc id={`${id}-description`}>{description}</desc>
      {children}
    </svg>
  )
}
