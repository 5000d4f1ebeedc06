import type { PlanQuestion } from './planQuestion.ts'
import { agreementLimits } from './questions/agreementLimits.ts'
import { areaFloor } from './questions/areaFloor.ts'
import { areaHalf } from './questions/areaHalf.ts'
import { areaPrecision } from './questions/areaPrecision.ts'
import { cutOffFloors } from './questions/cutOffFloors.ts'
import { cutOffPrecision } from './questions/cutOffPrecision.ts'
import { sensorCorrected, sensorCorrectedByVariances } from './questions/sensorCorrected.ts'
import { sensorDetection } from './questions/sensorDetection.ts'
import { sensorNoise } from './questions/sensorNoise.ts'
import { sensorReplicates } from './questions/sensorReplicates.ts'
import { testsDifferent } from './questions/testsDifferent.ts'
import { testsSame } from './questions/testsSame.ts'
import { twoAreasDifferent, twoAreasSame } from './questions/twoAreasModel.ts'
import { twoAreasPilot } from './questions/twoAreasPilot.ts'

export type PlanPart = {
  /** In the address: /planning/area. */
  key: string
  label: string
  /** The first is asked unless the address says otherwise. */
  questions: readonly [PlanQuestion, ...PlanQuestion[]]
}

/** The questions of planning, by what they are about. */
export const PLAN_PARTS: readonly [PlanPart, ...PlanPart[]] = [
  { key: 'area', label: 'One area', questions: [areaFloor, areaHalf, areaPrecision] },
  {
    key: 'two-areas',
    label: 'Two areas',
    questions: [twoAreasSame, twoAreasDifferent, twoAreasPilot],
  },
  { key: 'cut-off', label: 'At a cut-off', questions: [cutOffFloors, cutOffPrecision] },
  { key: 'two-tests', label: 'Two tests', questions: [testsSame, testsDifferent] },
  { key: 'agreement', label: 'Agreement', questions: [agreementLimits] },
  {
    key: 'noise',
    label: 'Sensor noise',
    questions: [
      sensorNoise,
      sensorReplicates,
      sensorCorrected,
      sensorCorrectedByVariances,
      sensorDetection,
    ],
  },
]

/** The question that an address names. */
export function planQuestionAt(part: string, ask: string): PlanQuestion | undefined {
  return PLAN_PARTS.find(({ key }) => key === part)?.questions.find((each) => each.ask === ask)
}
