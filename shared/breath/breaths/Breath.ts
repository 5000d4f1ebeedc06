/** An exhalation as found in CO2. */
export type Breath = {
  /** First and last sample at or above 50 % of this breath's CO2 maximum. */
  first: number
  last: number
  /** Interpolated crossings of that level; the record's own edge where the breath is cut off. */
  startS: number
  endS: number
  co2MaximumPercent: number
  cutOff: boolean
}
