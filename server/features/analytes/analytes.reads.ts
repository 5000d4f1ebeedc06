import { asc, eq } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'

/** What a study measures, by name. */
export const listAnalytes = (read: Reader, studyId: string): Promise<Analyte[]> =>
  read
    .select({
      id: analytes.id,
      key: analytes.key,
      name: analytes.name,
      formula: analytes.formula,
      casNumber: analytes.casNumber,
      molarMassGPerMol: analytes.molarMassGPerMol,
      unit: analytes.unit,
    })
    .from(analytes)
    .where(eq(analytes.studyId, studyId))
    .orderBy(asc(analytes.name), asc(analytes.key))
