/** Why a computation was refused. Screens and tests branch on the code, people read the sentence. */
export type StatisticsErrorCode =
  | 'too-few'
  | 'non-finite'
  | 'not-positive'
  | 'one-class'
  | 'constant'
  | 'unequal-length'
  | 'out-of-range'
  | 'different-units'
  | 'separation'
  | 'collinear'
  | 'no-convergence'

/** A refusal by a statistical function: a code and a sentence that says what is wrong. */
export class StatisticsError extends Error {
  readonly code: StatisticsErrorCode

  constructor(code: StatisticsErrorCode, sentence: string) {
    super(sentence)
    this.name = 'StatisticsError'
    this.code = code
  }
}
