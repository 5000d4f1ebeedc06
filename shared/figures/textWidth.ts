/**
 * Advance widths of Noto Sans for U+0020 to U+007E, in thousandths of the font size, read from the
 * font's own hmtx table. There is no page to measure on when a report is drawn.
 */
const REGULAR = [
  260, 269, 408, 646, 572, 831, 732, 225, 300, 300, 551, 572, 268, 322, 268, 372, 572, 572, 572,
  572, 572, 572, 572, 572, 572, 572, 268, 268, 572, 572, 572, 434, 899, 639, 650, 632, 730, 556,
  519, 728, 741, 339, 273, 619, 524, 907, 760, 781, 605, 781, 622, 549, 556, 731, 600, 930, 586,
  566, 572, 329, 372, 329, 572, 444, 281, 561, 615, 480, 615, 564, 344, 615, 618, 258, 258, 534,
  258, 935, 618, 605, 615, 615, 413, 479, 361, 618, 508, 786, 529, 510, 470, 380, 551, 380, 572,
]
/** Anything else is taken as wide as a digit, which errs on the wide side for Latin text. */
const OTHER = 600
/** Semi-bold runs at most this much wider. */
const BOLD = 1.07

/** Width of one line of Noto Sans in the unit of `fontSize`. */
export function textWidth(text: string, fontSize: number, bold = false): number {
  let thousandths = 0
  for (const sign of text) thousandths += REGULAR[sign.codePointAt(0)! - 32] ?? OTHER
  return (thousandths / 1000) * fontSize * (bold ? BOLD : 1)
}

/** The text, or its beginning and "…" where it is wider than there is room. */
export function fitText(text: string, room: number, fontSize: number, bold = false): string {
  if (textWidth(text, fontSize, bold) <= room) return text
  const signs = [...text]
  while (signs.length > 0 && textWidth(`${signs.join('')}…`, fontSize, bold) > room) signs.pop()
  return `${signs.join('').trimEnd()}…`
}
