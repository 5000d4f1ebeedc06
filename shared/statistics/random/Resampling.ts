/** What every resampling function takes. */
export type Resampling = {
  /** A whole number 0…2³²−1; the same seed gives the same result to the last digit. */
  seed: number
  /** 2,000 unless given. */
  replicates?: number
  /** Told the share done, now and then; may throw to cancel. */
  onProgress?: (share: number) => void
}
