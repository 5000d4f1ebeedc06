/** With fewer subjects than this in a class an area says next to nothing. */
export const LEAST_PER_CLASS = 10

export const tooFew = (present: number, absent: number): boolean =>
  Math.min(present, absent) < LEAST_PER_CLASS

/** Why no area is given. */
export const withheldSentence = (present: number, absent: number): string =>
  `No area is given: it takes at least ${LEAST_PER_CLASS} subjects with the condition and ${LEAST_PER_CLASS} without, and there are ${present} and ${absent}.`
