/**
 * Regulatory standing of the sensor in a study and the caution that follows from it. The first two
 * wordings are those of 21 CFR 809.10(c)(2)(i) and (ii); the others name the standing in plain words.
 * Legal review of the study settles which one applies.
 */
export const REGULATORY_STATUSES = [
  'researchUse',
  'researchUseUs',
  'investigationalUs',
  'performanceStudyEu',
] as const
export type RegulatoryStatus = (typeof REGULATORY_STATUSES)[number]

export const REGULATORY_STATUS_LABELS: Record<RegulatoryStatus, string> = {
  researchUse: 'Research use only',
  researchUseUs: 'Research use only (United States wording)',
  investigationalUs: 'Investigational use only (United States wording)',
  performanceStudyEu: 'Device for performance study (European Union)',
}

export type CautionWords = { title: string; text: string }

export const CAUTIONS: Record<RegulatoryStatus, CautionWords> = {
  researchUse: {
    title: 'For research use only',
    text: 'Not for diagnosis or treatment decisions. Cut-offs found here are not validated.',
  },
  researchUseUs: {
    title: 'For Research Use Only. Not for use in diagnostic procedures.',
    text: 'Cut-offs found here are not validated.',
  },
  investigationalUs: {
    title:
      'For Investigational Use Only. The performance characteristics of this product have not been established.',
    text: 'Not for diagnosis or treatment decisions.',
  },
  performanceStudyEu: {
    title: 'Device for performance study',
    text: 'For research use only. Not for diagnosis or treatment decisions. Cut-offs found here are not validated.',
  },
}

/** The stamp of a study that holds both classes together. */
export const UNBLINDED_STAMP =
  'Earlier data: sensor and reference values are held together. Nobody in this study is blinded.'
export const DEMONSTRATION_STAMP = 'Demonstration study: all data are invented.'

/** Stands wherever somebody could act on a figure at a bedside. */
export const LOCAL_PROTOCOL = 'Local protocol and licensed clinicians decide.'
