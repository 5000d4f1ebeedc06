/** A JSON value of a reference file; 'Infinity' and '-Infinity' are strings, null is undefined. */
export type Json = null | number | string | boolean | Json[] | { [key: string]: Json }

export type Tolerance =
  | { type: 'relative'; size: number; floor?: number }
  | { type: 'absolute'; size: number }

/** One record of `results/*.json`. */
export type ReferenceRecord = {
  dataset: string
  marker: string
  direction: string
  quantity: string
  method: string
  value: Json
  source: string
  tolerance: Tolerance
  note?: string
}
