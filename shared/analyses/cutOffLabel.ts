import type { AccuracyOverall } from '#shared/schemas/analysis.ts'
import { CUT_OFF_RULE_LABELS } from '#shared/terms/analysis.ts'

/** What the mark of a cut-off is called on figures, on the screen and in print. */
export function cutOffLabel(
  cutOff: number,
  planned: number | null,
  rules: AccuracyOverall['rules'],
): string {
  if (cutOff === planned) return 'planned cut-off'
  const found = rules.find(({ cutOffs }) => cutOffs.some(({ threshold }) => threshold === cutOff))
  return found ? `${CUT_OFF_RULE_LABELS[found.rule]}, exploratory` : 'cut-off, exploratory'
}
