/** One instant of an exhalation; null where there is no sample, such as where the aligned gas ends. */
export interface ExhalationSample {
  timeS: number
  co2Percent: number
  gas: number | null
}

/** The gas of a curve: its name in words and its unit. */
export interface ExhalationGas {
  label: string
  unit: string
}
