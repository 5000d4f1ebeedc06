import type { Actual } from './compare.ts'
import type { Json, ReferenceRecord } from './ReferenceRecord.ts'
import type { Table } from './Table.ts'

/** What a quantity needs of its surroundings. */
export type Surroundings = {
  record: ReferenceRecord
  /** The record's value, for the inputs that it carries (thresholds, counts, levels). */
  given: { [key: string]: Json }
  /** A table of the same folder, by its name without .csv. */
  table: (name: string) => Table
  /** Names of all tables there. */
  tables: string[]
}

/** Asks the product's function for a record's quantity and puts the answer in the record's shape. */
export type Quantity = (surroundings: Surroundings) => Actual

/** Quantities by name; a name that ends in * stands for all that begin so. */
export type Quantities = Record<string, Quantity>
