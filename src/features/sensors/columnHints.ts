/** Units that stand behind an underscore in headings of gas and sensor files. */
const UNITS = /^(ppb|ppm|ppt|[fpnuµm]?[AV]|counts|hz|percent|ug_m3)$/i

/** "level_ppb" and "level (ppb)" both carry ppb; nothing where no unit can be told. */
export function unitOf(heading: string): string | undefined {
  const inBrackets = /[([]([^)\]]{1,12})[)\]]\s*$/.exec(heading)?.[1]
  if (inBrackets) return inBrackets.trim()
  const tail = heading.split('_').at(-1) ?? ''
  return heading.includes('_') && UNITS.test(tail) ? tail : undefined
}

/** The heading that a word points to, or the one at a place; somebody may choose another. */
export function suggestedColumn(
  headings: readonly string[],
  hint: RegExp,
  otherwise: number,
): string {
  return headings.find((heading) => hint.test(heading)) ?? headings.at(otherwise) ?? ''
}

export const LEVEL_HINT = /level|standard|certified|concentration/i
export const SIGNAL_HINT = /signal|response|reading|current|voltage/i
export const KIND_HINT = /kind|type|sample|level/i
