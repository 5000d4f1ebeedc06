import type { CutOffCorrections } from '#shared/schemas/accuracyMore.ts'
import type { ResamplingChoice } from '#shared/schemas/resampling.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import type { CutOffRule as ChoosingRule } from '#shared/statistics/cutOffs/chosenPoint.ts'
import { optimismOfCutOff } from '#shared/statistics/cutOffs/optimismOfCutOff.ts'
import { CUT_OFF_RULES, type CutOffRule } from '#shared/terms/analysis.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import { tooFew } from './leastPerClass.ts'

const CHOOSING: Record<CutOffRule, ChoosingRule> = {
  youden: { kind: 'youden' },
  closestToCorner: { kind: 'closestToCorner' },
  sensitivityAtLeast: { kind: 'sensitivityAtLeast', least: 0.9 },
  specificityAtLeast: { kind: 'specificityAtLeast', least: 0.9 },
}
const SESSIONS_TOGETHER =
  'Cut-offs are corrected for having been chosen where each subject counts once. Choose one value for each subject to see it.'
const FEW = 'Too few subjects in a class: no cut-off is chosen from these data.'

type Values = {
  present: readonly number[]
  absent: readonly number[]
  /** Set where subjects have several sessions in it. */
  presentSubjects: readonly number[] | null
}

/**
 * Sensitivity and specificity of every cut-off that a rule chooses, with the optimism of choosing it on
 * the same data taken off; all rules draw from the same seed.
 * @param onProgress told the share done; throw in it to stop
 */
export function cutOffCorrectionsOf(
  { present, absent, presentSubjects }: Values,
  direction: Direction,
  { seed, replicates }: ResamplingChoice,
  onProgress?: (share: number) => void,
): CutOffCorrections {
  const made = { seed, replicates, method: 'bootstrap, stratified' }
  const note = presentSubjects
    ? SESSIONS_TOGETHER
    : tooFew(present.length, absent.length)
      ? FEW
      : null
  if (note) return { ...made, rules: [], note }
  const curve = rocCurve({ present, absent, direction })
  const rules = CUT_OFF_RULES.map((rule, at) => {
    const { apparent, optimism, corrected } = optimismOfCutOff(curve, CHOOSING[rule], {
      seed,
      replicates,
      onProgress: (share) => onProgress?.((at + share) / CUT_OFF_RULES.length),
    })
    const { threshold, sensitivity, specificity } = apparent
    return { rule, threshold, apparent: { sensitivity, specificity }, optimism, corrected }
  })
  return { ...made, rules, note: null }
}
