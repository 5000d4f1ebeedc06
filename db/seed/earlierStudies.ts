import { agreementParameters } from '#shared/schemas/agreement.ts'
import {
  type AccuracyParameters,
  type AnalysisParameters,
  type AnalysisRequest,
  accuracyParameters,
} from '#shared/schemas/analysis.ts'
import type { ColumnMeaning } from '#shared/schemas/import.ts'
import type { StudyInput } from '#shared/schemas/study.ts'
import { SeededRandom } from './random.ts'

/** A demonstration study: how it is set up, and the file that holds its data. All of it invented. */
export type DemonstrationStudy = {
  input: Omit<StudyInput, 'id'>
  csv: string
  /** What each column of the file means, by heading. */
  meanings: Record<string, ColumnMeaning>
  /** Site by the word in the file, as its prefix. */
  siteWords: Record<string, string>
  locked: boolean
  /** What the analyst stores after the lock, and reports. */
  analyses: Pick<AnalysisRequest, 'title' | 'parameters'>[]
}

const SITES = [
  { name: 'North ward', prefix: 'N04', plannedSubjects: 96 },
  { name: 'South clinic', prefix: 'N02', plannedSubjects: 84 },
  { name: 'Harbour hospital', prefix: 'H11', plannedSubjects: 60 },
]

/** Log-normal breath ammonia, higher in the condition; a reference analyser with its own small bias. */
function ammoniaRows(count: number, seed: number): string {
  const random = new SeededRandom(seed)
  const lines = [
    'row,site,sex,age,ammonia_ppb,below_lod,acetone_ppb,analyser_ammonia_ppb,condition',
  ]
  for (let row = 1; row <= count; row++) {
    const present = random.uniform() < 0.38
    const age = Math.round(30 + 50 * random.uniform() + (present ? 6 : 0))
    const logAmmonia = Math.log(present ? 1350 : 760) + 0.52 * random.normal()
    const truth = Math.exp(logAmmonia)
    const sensor = truth * Math.exp(0.07 * random.normal())
    const analyser = truth * 0.97 + 12 + 25 * random.normal()
    const acetone = Math.exp(Math.log(present ? 640 : 560) + 0.6 * random.normal())
    const belowLod = sensor < 250
    const decided = random.uniform()
    const outcome =
      decided < 0.03 ? 'indeterminate' : decided < 0.05 ? '' : present ? 'present' : 'absent'
    const sensorText =
      random.uniform() < 0.025 ? '' : String(Math.max(250, Math.round(sensor / 10) * 10))
    const analyserText = random.uniform() < 0.08 ? '' : Math.max(1, analyser).toFixed(0)
    lines.push(
      [
        `D${String(row).padStart(4, '0')}`,
        random.pick(['north', 'north', 'south', 'south', 'harbour']),
        random.uniform() < 0.46 ? 'F' : 'M',
        age,
        sensorText,
        sensorText === '' ? '' : belowLod ? 1 : 0,
        acetone.toFixed(0),
        analyserText,
        outcome,
      ].join(','),
    )
  }
  return `${lines.join('\n')}\n`
}

/** Three sessions a subject: the same breath again, so that precision can be seen. */
function repeatedRows(subjects: number, seed: number): string {
  const random = new SeededRandom(seed)
  const lines = ['row,site,session,sex,age,ammonia_ppb,analyser_ammonia_ppb,condition']
  for (let subject = 1; subject <= subjects; subject++) {
    const present = random.uniform() < 0.4
    const usual = Math.exp(Math.log(present ? 1300 : 780) + 0.45 * random.normal())
    const site = random.pick(['north', 'south'])
    const sex = random.uniform() < 0.5 ? 'F' : 'M'
    const age = Math.round(35 + 45 * random.uniform())
    for (let session = 1; session <= 3; session++) {
      const truth = usual * Math.exp(0.09 * random.normal())
      const sensor = truth * Math.exp(0.06 * random.normal())
      const analyser = truth * 0.98 + 10 + 20 * random.normal()
      lines.push(
        [
          `R${String(subject).padStart(3, '0')}`,
          site,
          session,
          sex,
          age,
          sensor.toFixed(0),
          Math.max(1, analyser).toFixed(0),
          present ? 'present' : 'absent',
        ].join(','),
      )
    }
  }
  return `${lines.join('\n')}\n`
}

const MEANINGS: DemonstrationStudy['meanings'] = {
  row: { as: 'subject' },
  site: { as: 'site' },
  sex: { as: 'sex', F: ['F'], M: ['M'], other: [], unknown: [] },
  age: { as: 'ageYears', andOver: null },
  ammonia_ppb: { as: 'sensorValue', analyteKey: 'ammonia' },
  below_lod: { as: 'belowLod', analyteKey: 'ammonia' },
  acetone_ppb: { as: 'sensorValue', analyteKey: 'acetone' },
  analyser_ammonia_ppb: { as: 'referenceValue', analyteKey: 'ammonia' },
  condition: {
    as: 'outcome',
    present: ['present'],
    absent: ['absent'],
    indeterminate: ['indeterminate'],
  },
}

const SITE_WORDS = { north: 'N04', south: 'N02', harbour: 'H11' }

const accuracy = (
  at: Pick<AccuracyParameters, 'cutOff' | 'prevalence' | 'sessionRule'>,
): AnalysisParameters =>
  accuracyParameters.parse({
    ...at,
    kind: 'accuracy',
    analyteKey: 'ammonia',
    direction: 'higher',
    confidence: 0.95,
  })

const agreement = (sessionRule: 'first' | 'every'): AnalysisParameters =>
  agreementParameters.parse({
    kind: 'agreement',
    analyteKey: 'ammonia',
    sessionRule,
    confidence: 0.95,
    acceptance: { lower: -200, upper: 200 },
  })

const setUp = (
  code: string,
  title: string,
  plannedSubjects: number,
): DemonstrationStudy['input'] => ({
  kind: 'earlierData',
  code,
  title,
  sites: SITES,
  analytes: [
    {
      key: 'ammonia',
      name: 'Ammonia',
      formula: 'NH₃',
      casNumber: '7664-41-7',
      molarMassGPerMol: 17.031,
      unit: '[ppb]',
    },
    {
      key: 'acetone',
      name: 'Acetone',
      formula: 'C₃H₆O',
      casNumber: '67-64-1',
      molarMassGPerMol: 58.08,
      unit: '[ppb]',
    },
  ],
  document: {
    targetCondition: 'Advanced liver fibrosis (invented cases)',
    referenceStandard: 'Histology by two readers (invented)',
    sampling: 'cohort',
    regulatoryStatus: 'researchUse',
    plannedSubjects,
    primaryAnalyteKey: 'ammonia',
    biomarkers: [
      { analyteKey: 'ammonia', direction: 'higher', plannedCutOff: 1180 },
      { analyteKey: 'acetone', direction: 'higher', plannedCutOff: null },
    ],
    acceptanceLimits: [{ analyteKey: 'ammonia', lower: -200, upper: 200 }],
  },
})

export const DEMONSTRATION_STUDIES: readonly DemonstrationStudy[] = [
  {
    input: setUp(
      'LARK-1',
      'Exhaled ammonia in suspected advanced liver fibrosis, earlier data',
      240,
    ),
    csv: ammoniaRows(240, 20_261_130),
    meanings: MEANINGS,
    siteWords: SITE_WORDS,
    locked: true,
    analyses: [
      {
        title: 'Ammonia against histology, planned cut-off',
        parameters: accuracy({ cutOff: 1180, prevalence: 0.2, sessionRule: 'first' }),
      },
      {
        title: 'Ammonia, sensor against reference analyser',
        parameters: agreement('first'),
      },
    ],
  },
  {
    input: setUp('WREN-1', 'Exhaled ammonia on three days, repeatability, earlier data', 60),
    csv: repeatedRows(60, 41_180),
    meanings: { ...MEANINGS, session: { as: 'sessionNumber' } },
    siteWords: SITE_WORDS,
    locked: true,
    analyses: [
      {
        title: 'Ammonia against histology, every session, clustered by subject',
        parameters: accuracy({ cutOff: null, prevalence: null, sessionRule: 'every' }),
      },
      {
        title: 'Ammonia, sensor against reference analyser, three sessions a subject',
        parameters: agreement('every'),
      },
      {
        title: 'Precision of the ammonia sensor',
        parameters: {
          kind: 'precision',
          analyteKey: 'ammonia',
          measuredBy: 'sensor',
          confidence: 0.95,
          reliabilityWanted: 0.95,
          accuracyId: null,
        },
      },
    ],
  },
  {
    input: setUp('LARK-0', 'Exhaled ammonia, pilot series, data still open', 60),
    csv: ammoniaRows(60, 7_316),
    meanings: MEANINGS,
    siteWords: SITE_WORDS,
    locked: false,
    analyses: [],
  },
]

/** Who is in the team of both studies, by account of the stand-in identity provider. */
export const DEMONSTRATION_TEAM = [
  { account: 'monitor-oversight', role: 'monitor' },
  { account: 'analyst-centre', role: 'analyst' },
  { account: 'north-bedside', role: 'coordinator', site: 'North ward' },
  { account: 'north-lead', role: 'coordinator', site: 'North ward' },
  { account: 'south-bedside', role: 'coordinator', site: 'South clinic' },
] as const
