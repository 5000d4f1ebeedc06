import type { Content } from 'pdfmake/interfaces'
import { textRuns } from './textRuns.ts'

/** What belongs to the letters; everything else belongs to the paragraph. */
interface LetterStyle {
  bold?: boolean
  color?: string
  fontSize?: number
}

/** A text with the style of its paragraph, each sign in a font that has it. */
export function styledText(
  text: string,
  { bold, color, fontSize, ...paragraph }: LetterStyle & Record<string, unknown> = {},
): Content {
  // Runs carry the letters' style themselves: pdfmake loses it for nested texts.
  const letters = Object.fromEntries(
    Object.entries({ bold, color, fontSize }).filter(([, value]) => value !== undefined),
  )
  return { text: textRuns(text).map((run) => ({ ...run, ...letters })), ...paragraph } as Content
}
