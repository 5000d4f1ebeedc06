import type { ComponentProps, MouseEvent } from 'react'
import { type ButtonKind, type ButtonSize, buttonLook } from './buttonLook.ts'
import { classes } from './classes.ts'

type ButtonProps = ComponentProps<'button'> & {
  kind?: ButtonKind
  size?: ButtonSize
  /** What is going on, while it goes on: the button keeps the focus and refuses a second press. */
  busy?: string | false
}

export function Button({
  kind,
  size,
  busy = false,
  type = 'button',
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  const press = (event: MouseEvent<HTMLButtonElement>) => {
    if (busy !== false) event.preventDefault()
    else onClick?.(event)
  }
  return (
    <button
      {...rest}
      type={type}
      onClick={press}
      aria-disabled={busy !== false || undefined}
      className={classes(buttonLook(kind, size), busy !== false && 'cursor-progress', className)}
    >
      {busy !== false && (
        <span
          aria-hidden="true"
          className="size-3.5 animate-spin rounded-full border-2 border-current border-r-transparent"
        />
      )}
      <span aria-live={busy === false ? undefined : 'polite'}>
        {busy === false ? children : busy}
      </span>
    </button>
  )
}
