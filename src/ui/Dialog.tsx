import { type ReactNode, useEffect, useId, useRef } from 'react'
import { classes } from './classes.ts'

type DialogProps = {
  open: boolean
  title: string
  /** Asked for by Escape or by the close button: set `open` to false. */
  onClose: () => void
  children: ReactNode
  actions?: ReactNode
  wide?: boolean
}

/** The browser's modal dialog keeps the focus inside and gives it back to where it came from. */
export function Dialog({ open, title, onClose, children, actions, wide = false }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null)
  const titleId = useId()

  useEffect(() => {
    const dialog = ref.current
    if (!dialog) return
    if (open && !dialog.open) dialog.showModal()
    if (!open && dialog.open) dialog.close()
  }, [open])

  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      onCancel={(event) => {
        // Bubbles up from a file field inside as well, which is no wish to close.
        if (event.target !== ref.current) return
        event.preventDefault()
        onClose()
      }}
      onClose={(event) => {
        if (event.target === ref.current && open) onClose()
      }}
      className={classes(
        'm-auto max-h-[calc(100dvh-32px)] w-[calc(100%-32px)] overflow-y-auto rounded border border-rule-2 bg-sheet p-0 text-ink shadow-[0_12px_40px_rgb(0_0_0/0.25)] backdrop:bg-[rgb(7_15_16/0.55)]',
        wide ? 'max-w-3xl' : 'max-w-lg',
      )}
    >
      {open && (
        <div className="px-6 py-5 max-tablet:px-4">
          <div className="mb-3 flex items-start gap-4">
            <h2 id={titleId} className="mb-0 min-w-0 flex-1 text-lg">
              {title}
            </h2>
            <button
              type="button"
              onClick={onClose}
              aria-label="Close"
              className="-mt-1.5 -mr-2 grid size-10 flex-none place-items-center rounded text-ink-2 hover:bg-spruce-2"
            >
              <svg viewBox="0 0 14 14" aria-hidden="true" className="size-3.5">
                <path d="M1 1l12 12M13 1 1 13" stroke="currentColor" strokeWidth="1.8" />
              </svg>
            </button>
          </div>
          {children}
          {actions !== undefined && (
            <div className="mt-5 flex flex-wrap justify-end gap-2.5">{actions}</div>
          )}
        </div>
      )}
    </dialog>
  )
}
