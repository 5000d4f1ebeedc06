/** Subjects that share a column, counted. */
export interface CountedColumn {
  /** Middle of the column, in figure units. */
  x: number
  count: number
}

/** Counts places into columns of equal width, one of which begins at `border`. */
export function countColumns(
  places: readonly number[],
  border: number,
  width: number,
): CountedColumn[] {
  const counts = new Map<number, number>()
  for (const place of places) {
    const column = Math.floor((place - border) / width)
    counts.set(column, (counts.get(column) ?? 0) + 1)
  }
  return [...counts]
    .sort(([a], [b]) => a - b)
    .map(([column, count]) => ({ x: border + (column + 0.5) * width, count }))
}

/** The round number of subjects for one mark, so that no column is higher than `rows` marks. */
export function subjectsPerMark(columns: readonly CountedColumn[], rows: number): number {
  const most = columns.reduce((high, { count }) => Math.max(high, count), 0)
  for (let power = 1; ; power *= 10) {
    for (const step of [1, 2, 5]) {
      if (Math.ceil(most / (step * power)) <= rows) return step * power
    }
  }
}
