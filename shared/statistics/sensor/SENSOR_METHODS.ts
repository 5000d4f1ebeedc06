/** The methods of the sensor page in words, with their source. */
export const SENSOR_METHODS = {
  line: {
    name: 'Least squares',
    source: 'Miller & Miller 2010, Statistics and Chemometrics for Analytical Chemistry, ch. 5',
  },
  lackOfFit: { name: 'Test for lack of fit', source: 'Draper & Smith 1998, section 2.1' },
  inverse: { name: 'Fieller limits', source: 'Fieller 1954, J R Stat Soc B 16:175' },
  detection: { name: '3.3·σ/slope and 10·σ/slope', source: 'ICH Q2(R2) 2023' },
  limitOfBlank: {
    name: 'Limit of blank and of detection',
    source: 'CLSI EP17-A2 (2012); Armbruster & Pry 2008, Clin Biochem Rev 29 Suppl 1:S49',
  },
  allan: {
    name: 'Allan deviation over octaves',
    source: 'Allan 1966, Proc IEEE 54:221; NIST SP 1065 (Riley 2008)',
  },
  allanMinimum: {
    name: 'Longest useful average',
    source: 'Werle, Mücke & Slemr 1993, Appl Phys B 57:131',
  },
  uncertainty: { name: 'Expanded uncertainty', source: 'JCGM 100:2008 (GUM), 4.3, 5.1.2 and G.4' },
} as const satisfies Record<string, { name: string; source: string }>
export type SensorMethod = keyof typeof SENSOR_METHODS
