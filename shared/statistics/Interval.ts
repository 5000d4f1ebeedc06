/** A two-sided interval; both ends finite, lower ≤ upper. */
export type Interval = { lower: number; upper: number }

/** Options of every function that gives an interval; `level` is 0.95 unless given. */
export type LevelOption = { level?: number }
