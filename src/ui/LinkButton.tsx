import type { ComponentProps } from 'react'
import { classes } from './classes.ts'

/** Something that acts on this page, quiet enough to stand in a sentence. */
export function LinkButton({ type = 'button', className, ...rest }: ComponentProps<'button'>) {
  return (
    <button
      {...rest}
      type={type}
      className={classes(
        'min-h-6 text-left text-spruce underline decoration-1 underline-offset-2 hover:decoration-2',
        'disabled:text-ink-2 disabled:no-underline',
        className,
      )}
    />
  )
}
