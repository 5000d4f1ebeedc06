import { z } from 'zod'
import { isCasNumber } from '#shared/terms/casNumber.ts'
import { REGULATORY_STATUSES } from '#shared/terms/cautions.ts'
import { UNIT_CODES } from '#shared/terms/gases.ts'
import { DIRECTIONS, SAMPLINGS } from '#shared/terms/protocol.ts'
import { id, instant, reasonForChange, words } from './common.ts'

const analyteKey = z.string().regex(/^[a-z0-9_]{1,40}$/, 'Small letters, digits and _ only.')
const number = z.number({ error: 'Please give a number.' }).finite('Please give a number.')

/** What is measured: from the catalogue, or of one's own. */
export const analyteInput = z.object({
  key: analyteKey,
  name: words(80),
  formula: words(20).optional(),
  casNumber: z
    .string()
    .refine(isCasNumber, 'This is not a CAS number: its form or its last digit is wrong.')
    .optional(),
  molarMassGPerMol: number
    .positive('Must be more than 0.')
    .max(2000, 'At most 2,000 g/mol.')
    .optional(),
  unit: z.enum(UNIT_CODES, { error: 'Please choose a unit.' }),
})
export type AnalyteInput = z.infer<typeof analyteInput>

export const analyte = z.object({
  id,
  key: z.string(),
  name: z.string(),
  formula: z.string().nullable(),
  casNumber: z.string().nullable(),
  molarMassGPerMol: z.number().nullable(),
  unit: z.string(),
})
export type Analyte = z.infer<typeof analyte>

/** Sensor value as a biomarker of the target condition. */
export const biomarker = z.object({
  analyteKey,
  direction: z.enum(DIRECTIONS, {
    error: 'Please choose a direction. It is never guessed from the data.',
  }),
  plannedCutOff: number.nullable(),
})

/** Sensor against reference analyser: what difference would still be acceptable, in the analyte's unit. */
export const acceptanceLimits = z
  .object({ analyteKey, lower: number, upper: number })
  .refine((limits) => limits.lower < limits.upper, {
    path: ['upper'],
    message: 'The upper limit must be above the lower one.',
  })

/** Everything that the analysis of a study hangs on; a change is a new version. */
export const protocolDocument = z
  .object({
    targetCondition: words(200),
    referenceStandard: words(200),
    sampling: z.enum(SAMPLINGS, { error: 'Please say how subjects came in.' }),
    regulatoryStatus: z.enum(REGULATORY_STATUSES),
    plannedSubjects: number.int('A whole number.').positive('Must be more than 0.').nullable(),
    /** One of the biomarkers; judged once those are whole. */
    primaryAnalyteKey: z.string().max(40),
    biomarkers: z.array(biomarker).min(1, 'At least one biomarker.').max(20, 'At most 20.'),
    acceptanceLimits: z.array(acceptanceLimits).max(20, 'At most 20.'),
  })
  .superRefine((document, context) => {
    const keys = document.biomarkers.map((each) => each.analyteKey)
    if (new Set(keys).size !== keys.length)
      context.addIssue({ code: 'custom', path: ['biomarkers'], message: 'Each analyte once.' })
    if (!keys.includes(document.primaryAnalyteKey))
      context.addIssue({
        code: 'custom',
        path: ['primaryAnalyteKey'],
        message: 'Choose one of the biomarkers.',
      })
    const limited = document.acceptanceLimits.map((each) => each.analyteKey)
    if (new Set(limited).size !== limited.length)
      context.addIssue({
        code: 'custom',
        path: ['acceptanceLimits'],
        message: 'Each analyte once.',
      })
  })
export type ProtocolDocument = z.infer<typeof protocolDocument>

/** Where a protocol speaks of an analyte that its study does not measure. */
export function strangeAnalytes(
  document: ProtocolDocument,
  analyteKeys: readonly string[],
): { path: (string | number)[]; message: string }[] {
  return (['biomarkers', 'acceptanceLimits'] as const).flatMap((part) =>
    document[part].flatMap(({ analyteKey: key }, index) =>
      analyteKeys.includes(key)
        ? []
        : [{ path: [part, index, 'analyteKey'], message: 'The study does not measure this.' }],
    ),
  )
}

export const protocolVersion = z.object({
  id,
  number: z.number().int(),
  document: protocolDocument,
  documentHash: z.string(),
  createdAt: instant,
  createdByName: z.string(),
  /** Why it was amended; null for the first version. */
  reason: z.string().nullable(),
})
export type ProtocolVersion = z.infer<typeof protocolVersion>

/** An amendment: the whole document anew, the number of the version that the person saw, and why. */
export const protocolAmendment = z.object({
  document: protocolDocument,
  basedOn: z.number().int(),
  reasonForChange,
})
export type ProtocolAmendment = z.infer<typeof protocolAmendment>
