/**
 * Paired measurements, one pair a position; difference = first − second (sensor − reference analyser).
 * The units have to be the same: agreement between different units has no meaning.
 */
export type Pairs = {
  first: ArrayLike<number>
  second: ArrayLike<number>
  /** Units of the two, compared where given. */
  firstUnit?: string
  secondUnit?: string
}
