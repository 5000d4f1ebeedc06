import type { ReactNode } from 'react'

type FactsProps = {
  items: readonly { term: string; value: ReactNode }[]
  /** `margin`: one below the other, side by side when the margin folds. `rows`: term and value in two columns. */
  layout?: 'margin' | 'rows'
}

export function Facts({ items, layout = 'margin' }: FactsProps) {
  if (layout === 'rows') {
    return (
      <dl className="grid grid-cols-[minmax(8em,max-content)_minmax(0,1fr)] gap-x-5 gap-y-1.5 max-tablet:grid-cols-1 max-tablet:gap-y-0">
        {items.map(({ term, value }) => (
          <div key={term} className="contents">
            <dt className="text-sm leading-[22px] text-ink-2">{term}</dt>
            <dd className="max-tablet:mb-2">{value}</dd>
          </div>
        ))}
      </dl>
    )
  }
  return (
    <dl className="max-wide:grid max-wide:grid-cols-[max-content_minmax(0,1fr)] max-wide:gap-x-3.5 max-wide:gap-y-0.5">
      {items.map(({ term, value }) => (
        <div key={term} className="mb-2.5 last:mb-0 max-wide:contents">
          <dt className="text-[11.5px] leading-[1.5] text-ink-2 max-wide:max-w-[9em] max-wide:leading-[19px]">
            {term}
          </dt>
          <dd className="text-ink">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
