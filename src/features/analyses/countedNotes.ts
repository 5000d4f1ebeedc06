import type { AccuracyCounts, AgreementCounts } from '#shared/schemas/dataset.ts'
import { SESSION_RULE_LABELS, type SessionRule } from '#shared/terms/analysis.ts'
import { formatCount } from '#shared/terms/numbers.ts'

/** What is to be known of the subjects who are counted, as short sentences. */
export function countedNotes(
  {
    severalSessions,
    belowLod,
  }: Pick<AccuracyCounts | AgreementCounts, 'severalSessions' | 'belowLod'>,
  rule: SessionRule,
): string[] {
  const notes: string[] = []
  if (severalSessions > 0)
    notes.push(
      `${formatCount(severalSessions)} with several sessions: ${lowerFirst(SESSION_RULE_LABELS[rule])}`,
    )
  if (belowLod > 0)
    notes.push(
      `${formatCount(belowLod)} ${belowLod === 1 ? 'value' : 'values'} below the limit of detection, used as given`,
    )
  return notes
}

const lowerFirst = (text: string) => text.charAt(0).toLowerCase() + text.slice(1)
