import type { RefObject } from 'react'
import { useFormParts } from './formContext.ts'

export type SummaryEntry = { name: string; message: string }

type ErrorSummaryProps = {
  ref: RefObject<HTMLDivElement | null>
  /** What the server said about the whole. */
  message?: string
  requestId?: string
  entries: readonly SummaryEntry[]
}

/** What has to be put right, each with the way to its field. Takes the focus when it appears. */
export function ErrorSummary({ ref, message, requestId, entries }: ErrorSummaryProps) {
  const { idOf, labels } = useFormParts()
  return (
    <div
      ref={ref}
      tabIndex={-1}
      role="alert"
      aria-labelledby={idOf('summary')}
      className="mb-5 rounded-[3px] border border-l-[5px] border-stop bg-stop-2 px-4 py-3 text-stop-ink"
    >
      <h2 id={idOf('summary')} className="mb-1">
        Not saved
      </h2>
      {message !== undefined && <p>{message}</p>}
      {requestId !== undefined && (
        <p className="text-sm">
          When you report this, give the number <code className="font-mono">{requestId}</code>.
        </p>
      )}
      {entries.length > 0 && (
        <ul className="mt-1 list-disc pl-5">
          {inOrderOfPage(entries, idOf).map(({ name, message: sentence }) => (
            <li key={name}>
              <a
                href={`#${idOf(name)}`}
                className="text-stop-ink underline underline-offset-2"
                onClick={(event) => {
                  event.preventDefault()
                  focusField(idOf(name))
                }}
              >
                {labels.has(name) ? `${labels.get(name)}: ${sentence}` : sentence}
              </a>
            </li>
          ))}
        </ul>
      )}
    </div>
  )
}

/** The schema lists its fields in an order of its own; the person reads the page from the top. */
function inOrderOfPage(
  entries: readonly SummaryEntry[],
  idOf: (name: string) => string,
): SummaryEntry[] {
  const placed = entries.map((entry) => ({
    entry,
    control: document.getElementById(idOf(entry.name)),
  }))
  placed.sort((a, b) => {
    if (!a.control || !b.control) return Number(a.control === null) - Number(b.control === null)
    const follows = Node.DOCUMENT_POSITION_FOLLOWING
    return (a.control.compareDocumentPosition(b.control) & follows) === 0 ? 1 : -1
  })
  return placed.map(({ entry }) => entry)
}

/** A field in a folded section is unfolded first. */
function focusField(id: string): void {
  const control = document.getElementById(id)
  control?.closest('details')?.setAttribute('open', '')
  control?.scrollIntoView({ block: 'center' })
  control?.focus({ preventScroll: true })
}
