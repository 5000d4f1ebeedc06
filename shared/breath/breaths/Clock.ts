/**
 * A trace's time in whole ticks, so that "three seconds before the end" means what the file's
 * decimals say and not what their nearest doubles add up to.
 */
export type Clock = {
  ticksPerSecond: number
  /** Median step, in ticks and in seconds. */
  intervalTicks: number
  intervalS: number
  /** Whole ticks of an instant or a length in seconds. */
  ticks: (seconds: number) => number
}
