import { useMemo, useState } from 'react'
import type { LimitOfBlank } from '#shared/statistics/sensor/limitOfBlank.ts'
import { type Blanks, type BlanksGiven, blankLimitsOf, readBlanks } from './blanksOf.ts'

export type BlanksWork = {
  given: BlanksGiven
  onGiven: (given: BlanksGiven) => void
  blanks: Blanks | null
  problem: string | null
  limits: LimitOfBlank | null
  refusal: string | null
}

/** Blanks and low samples as given on the page; forgotten when the page is left. */
export function useBlanks(): BlanksWork {
  const [given, onGiven] = useState<BlanksGiven>({
    text: '',
    kindColumn: null,
    signalColumn: null,
    blankKind: null,
    lowKind: null,
  })
  return useMemo(() => {
    const { blanks, problem } = readBlanks(given)
    const found = blanks && blankLimitsOf(blanks)
    return {
      given,
      onGiven,
      blanks,
      problem,
      limits: found?.limits ?? null,
      refusal: found?.problem ?? null,
    }
  }, [given])
}
