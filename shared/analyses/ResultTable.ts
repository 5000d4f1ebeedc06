/** A table of a result in words, the same on the screen and in print. */
export type ResultTable = {
  caption: string
  columns: { header: string; numeric?: boolean }[]
  /** The first cell of a row is its heading. */
  rows: string[][]
  /** What has to be known about it, as sentences. */
  notes: string[]
}
