/** Results of two tests on the same subjects. */
export type PairedCounts = {
  bothPositive: number
  firstOnly: number
  secondOnly: number
  bothNegative: number
}
