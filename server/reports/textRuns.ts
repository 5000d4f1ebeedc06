import { fontFor, type ReportFont } from './reportFonts.ts'

export interface TextRun {
  text: string
  font: ReportFont
}

/** Stands for a sign that no font of the report has, so that its loss is seen. */
const LOST = '\uFFFD'

/**
 * A text in runs of one font each. Line breaks stay, other control characters become spaces, and
 * space goes with whatever stands before it.
 */
export function textRuns(text: string): TextRun[] {
  const runs: TextRun[] = []
  for (const sign of text.normalize('NFC')) {
    const shown = printable(sign)
    const last = runs.at(-1)
    const font = shown === ' ' && last ? last.font : fontOf(shown)
    if (last?.font === font) last.text += shown
    else runs.push({ text: shown, font })
  }
  return runs
}

function printable(sign: string): string {
  if (sign === '\n') return sign
  if (/\p{Cc}/u.test(sign)) return ' '
  return fontFor(sign.codePointAt(0)!) ? sign : LOST
}

function fontOf(shown: string): ReportFont {
  return shown === '\n' ? 'Noto Sans' : (fontFor(shown.codePointAt(0)!) ?? 'DejaVu Sans')
}
