import type { DataImport, ImportMapping, ImportReading } from '#shared/schemas/import.ts'

/** What the form begins with; the decimal sign stays open until a person says it. */
export type MappingDraft = Omit<ImportMapping, 'format'> & {
  format: Partial<ImportMapping['format']>
}

/** The meanings as they were last given for these columns, or as the file suggests them. */
export function mappingDefaults(of: DataImport, reading: ImportReading): MappingDraft {
  const { mapping } = of
  if (mapping && fitsReading(mapping, reading)) return mapping
  return {
    format: { delimiter: reading.delimiter },
    columns: reading.columns.map(({ name, suggestion }) => ({ name, meaning: suggestion })),
    siteId: reading.siteId,
    sitesByWord: reading.sitesByWord,
  }
}

export const fitsReading = (mapping: MappingDraft, reading: ImportReading): boolean =>
  mapping.format.delimiter === reading.delimiter &&
  mapping.columns.length === reading.columns.length &&
  mapping.columns.every((column, index) => column.name === reading.columns[index]?.name)
