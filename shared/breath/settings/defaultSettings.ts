import type { TraceSettings } from './TraceSettings.ts'

/**
 * The protocol's defaults. Design choices of this project, each a setting, except: flow, pressure,
 * duration and the 10 % plateau follow the ATS/ERS 2005 recommendations for exhaled nitric oxide
 * (from memory), the 2 ppb rule below 30 ppb follows the NHANES 2007–08 exhaled nitric oxide
 * procedure, the ratio 1.15 to room air follows Bajtarevic 2009.
 */
export const defaultSettings: TraceSettings = {
  subject: 'adult',

  gapS: 0.3,
  slowestIntervalS: 0.1005,
  lowestCo2Percent: -1,
  smallestCo2MaximumPercent: 0.2,
  largestCo2MaximumPercent: 15,
  longestDelayS: 5,
  mostSamples: 4_000_000,

  edgePercent: 50,
  endPercent: 30,
  breathCo2Percent: 1,
  breathS: 1,
  breathFlowPercent: 50,
  inspiredPercentile: 5,

  windowS: 3,
  deadSpaceMl: 150,
  deadSpaceChildMl: 50,
  phaseThreePercent: 80,
  valveArtefactS: 0,
  longestInverseFilterS: 2,
  roomAirDistanceS: 1,

  targetFlowMlS: 50,
  flowTolerancePercent: 10,
  flowOutsidePercent: 10,
  flowMeanTolerancePercent: 5,
  lowestPressureCmH2o: 5,
  highestPressureCmH2o: 20,
  pressureOutsideS: 0.5,
  shortestS: 6,
  shortestChildS: 4,
  shortS: 8,
  co2VeryLowPercent: 3,
  co2LowPercent: 4,
  co2HighPercent: 6.5,
  rebreatheRejectPercent: 0.5,
  rebreatheWarnPercent: 0.2,
  restS: 30,
  slopePercent: 10,
  slopeRejects: ['nitric_oxide'],
  ambientRatio: 1.15,
  ambientExempt: ['carbonyl_sulfide'],
  lagRejectDivisor: 3,
  lagWarnDivisor: 5,
  sensorCheck: null,
  sensorCheckAgeH: 24,

  barometricPressureKpa: 101.325,
  referenceCo2Percent: 5,
  alveolarCo2Percent: 5,
  normalise: [],
  correctDilution: [],
  neverNormalise: ['nitric_oxide', 'ammonia', 'acetone'],

  sessionRule: 'median',
  fewestAccepted: 2,
  agreePercent: 10,
  agreePpbGases: ['nitric_oxide'],
  agreePpb: 2,
  agreePpbBelow: 30,
  coverage: 2,

  analytes: {},
}
