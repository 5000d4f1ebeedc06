/** Which way a marker points to the target condition; always given, never guessed. */
export type Direction = 'higher' | 'lower'

/**
 * A marker's values by reference outcome, one unit for both. Missing values have been left out and
 * counted before. `direction` 'higher': larger values point to the condition.
 */
export type Classes = {
  present: ArrayLike<number>
  absent: ArrayLike<number>
  direction: Direction
}
