import { useMemo, useState } from 'react'
import {
  type Calibration,
  calibrate,
  readStandards,
  type Standards,
  type StandardsGiven,
} from './calibrationOf.ts'

export type StandardsWork = {
  given: StandardsGiven
  onGiven: (given: StandardsGiven) => void
  standards: Standards | null
  /** Why the text cannot be read. */
  problem: string | null
  calibration: Calibration | null
  /** Why there is no line through what was read. */
  refusal: string | null
}

/** Standards as given on the page, read and calibrated; forgotten when the page is left. */
export function useStandards(): StandardsWork {
  const [given, onGiven] = useState<StandardsGiven>({
    text: '',
    levelColumn: null,
    signalColumn: null,
    weights: 'none',
  })
  return useMemo(() => {
    const { standards, problem } = readStandards(given)
    const made = standards && calibrate(standards, given.weights)
    return {
      given,
      onGiven,
      standards,
      problem,
      calibration: made?.calibration ?? null,
      refusal: made?.problem ?? null,
    }
  }, [given])
}
