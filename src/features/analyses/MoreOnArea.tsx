import type { MoreOnArea as Found } from '#shared/schemas/accuracyMore.ts'
import { formatEstimate, formatProbability } from '#shared/terms/numbers.ts'
import { Disclosure } from '../../ui/Disclosure.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** Tests of the area, its part, and other ways to estimate it, each with method and source. */
export function MoreOnArea({ found: { figures, note } }: { found: Found }) {
  return (
    <div className="mt-6">
      <Disclosure summary="More on the area" startsOpen>
        <StaticTable
          caption="More on the area"
          columns={[
            { header: 'Figure' },
            { header: 'Value', numeric: true },
            { header: 'p', numeric: true },
            { header: 'Method and source' },
          ]}
          rows={figures.map((each) => ({
            key: each.key,
            cells: [
              <span key="label" className="font-normal">
                {each.label}
                {each.note && <span className="block text-sm text-ink-2">{each.note}</span>}
              </span>,
              formatEstimate(each.value, each.key === 'mannWhitney' ? 1 : 3),
              each.p === null ? '' : formatProbability(each.p),
              <span key="method" className="block text-sm">
                {each.method}
                <span className="block text-ink-2">{each.source}</span>
              </span>,
            ],
          }))}
        />
        {note && <p className="mt-3 text-sm">{note}</p>}
      </Disclosure>
    </div>
  )
}
