/** Why a figure has no value although the computation as a whole succeeded. */
export type NotDefinedCode =
  | 'zero-denominator'
  | 'zero-cell'
  | 'unbounded'
  | 'zero-variance'
  | 'too-few'
  | 'below-chance'
  | 'not-positive'

/** Shown in the place of the figure: a code for programs and a sentence for people. */
export type NotDefined = { code: NotDefinedCode; sentence: string }
