import { NavLink } from 'react-router-dom'
import { classes } from './classes.ts'

type SegmentedLinksProps = {
  label: string
  items: readonly { to: string; label: string; count?: number; end?: boolean }[]
}

/** Parts of one station, each with its own address. */
export function SegmentedLinks({ label, items }: SegmentedLinksProps) {
  return (
    <nav aria-label={label} className="mb-4 overflow-x-auto border-b border-rule print:hidden">
      <ul className="flex min-w-max gap-6">
        {items.map((item) => (
          <li key={item.to}>
            <NavLink
              to={item.to}
              end={item.end}
              className={({ isActive }) =>
                classes(
                  'flex min-h-11 items-center gap-2 border-b-[3px] font-semibold no-underline',
                  isActive
                    ? 'border-spruce text-ink'
                    : 'border-transparent text-spruce hover:border-rule-2',
                )
              }
            >
              {item.label}
              {item.count !== undefined && (
                <span className="rounded-[3px] bg-spruce-2 px-1.5 text-xs font-normal text-spruce-ink">
                  {item.count}
                </span>
              )}
            </NavLink>
          </li>
        ))}
      </ul>
    </nav>
  )
}
