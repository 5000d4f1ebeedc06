import { double, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { recordColumns } from './columns.ts'

/** What a study measures: a gas of the catalogue, or anything else with a name and a unit. */
export const analytes = mysqlTable(
  'analytes',
  {
    ...recordColumns,
    /** Catalogue name in snake case, such as nitric_oxide; rules hang on it. */
    key: varchar('key', { length: 40 }).notNull(),
    name: varchar('name', { length: 80 }).notNull(),
    formula: varchar('formula', { length: 20 }),
    casNumber: varchar('cas_number', { length: 12 }),
    molarMassGPerMol: double('molar_mass_g_per_mol'),
    /** UCUM code, such as [ppb]. */
    unit: varchar('unit', { length: 20 }).notNull(),
  },
  (t) => [uniqueIndex('analytes_key').on(t.studyId, t.key)],
)
