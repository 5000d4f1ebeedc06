import type { AccuracyResult } from '#shared/schemas/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { Notice } from '../../ui/Notice.tsx'
import { ChosenCutOffs } from './ChosenCutOffs.tsx'
import { MoreOnArea } from './MoreOnArea.tsx'
import { SubgroupForest } from './SubgroupForest.tsx'
import { TroubledTable } from './TroubledTable.tsx'

/** What a stored accuracy analysis holds beyond curve, area and table. */
export function AccuracyMoreView({ result }: { result: AccuracyResult }) {
  const { rules, corrections, more, troubled, subgroupTables = [], success } = result
  return (
    <>
      {success && (
        <div className="mt-6">
          <Notice
            tone={success.met ? 'good' : 'warn'}
            title={`Success criterion ${success.met ? 'met' : 'not met'}`}
          >
            {success.parts.map(({ measure, sentence }) => (
              <p key={measure}>{sentence}</p>
            ))}
          </Notice>
        </div>
      )}
      <ChosenCutOffs rules={rules} corrections={corrections} unit={unitLabel(result.unit)} />
      {troubled && <TroubledTable troubled={troubled} unit={unitLabel(result.unit)} />}
      {subgroupTables.map((table) => (
        <SubgroupForest key={table.by} table={table} />
      ))}
      {more && <MoreOnArea found={more} />}
    </>
  )
}
