import type { Analysis } from '#shared/schemas/analysis.ts'
import { ANALYSIS_BADGE_LABELS } from '#shared/terms/analysis.ts'

/** The line under an analysis's title: its standing, and whether it uses what the protocol states. */
export function analysisSub({
  badge,
  asProtocol,
  protocolVersion,
  kind,
}: Pick<Analysis, 'badge' | 'asProtocol' | 'protocolVersion' | 'kind'>): string {
  const standing = ANALYSIS_BADGE_LABELS[badge]
  if (kind !== 'accuracy' && kind !== 'agreement')
    return `${standing}, not planned in protocol version ${protocolVersion}`
  const stated = kind === 'accuracy' ? 'the cut-off planned' : 'the acceptance limits stated'
  return asProtocol
    ? `${standing}, with ${stated} in protocol version ${protocolVersion}`
    : `${standing}, ${kind === 'accuracy' ? 'not with a cut-off' : 'not with acceptance limits'} of protocol version ${protocolVersion}`
}
