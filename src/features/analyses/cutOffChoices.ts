import type { AccuracyOverall } from '#shared/schemas/analysis.ts'
import { CUT_OFF_RULE_LABELS, type CutOffRule } from '#shared/terms/analysis.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'

export type CutOffChoice = { key: string; text: string; cutOff: number; rule: CutOffRule }

/** So many ties of one rule are shown; more would only fill the line. */
const MOST_TIES = 3

/** The cut-offs that rules choose from these data, as words: "Youden 1,050". */
export function cutOffChoices(rules: AccuracyOverall['rules']): CutOffChoice[] {
  return rules.flatMap(({ rule, cutOffs }) =>
    cutOffs.slice(0, MOST_TIES).flatMap(({ threshold }) => {
      if (threshold === null) return []
      const value = formatConcentration(threshold)
      const least = rule === 'sensitivityAtLeast' || rule === 'specificityAtLeast'
      const text = `${CUT_OFF_RULE_LABELS[rule]} ${least ? 'at ' : ''}${value}`
      return [{ key: `${rule} ${threshold}`, text, cutOff: threshold, rule }]
    }),
  )
}
