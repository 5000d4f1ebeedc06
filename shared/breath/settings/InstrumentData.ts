/** What is known of the instrument for one gas; from the file's `#` lines or the settings, which win. */
export type InstrumentData = {
  /** Seconds by which the gas arrives after CO2; negative where it arrives before. */
  transportDelayS: number
  /** Limit of detection. */
  lodPpb: number
  /** Largest value that the channel can show; a sample at or above it is saturated. */
  rangeMaxPpb: number
  /** Rise from 10 to 90 % of a step. */
  responseT1090S: number
}
