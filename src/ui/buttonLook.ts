import { classes } from './classes.ts'

export type ButtonKind = 'primary' | 'quiet' | 'danger'
export type ButtonSize = 'small' | 'normal' | 'large'

const KINDS: Record<ButtonKind, string> = {
  primary:
    'border-spruce bg-spruce text-on-spruce hover:brightness-110 disabled:hover:brightness-100',
  quiet: 'border-rule-2 bg-transparent text-spruce hover:bg-spruce-2 disabled:hover:bg-transparent',
  danger: 'border-stop bg-stop text-on-stop hover:brightness-110 disabled:hover:brightness-100',
}

const SIZES: Record<ButtonSize, string> = {
  small: 'min-h-8 px-3 py-1 text-sm',
  normal: 'min-h-[42px] px-4 py-2',
  large: 'min-h-14 px-[26px] py-3.5 text-lg',
}

/** One look for buttons and for links that act like one. */
export function buttonLook(kind: ButtonKind = 'primary', size: ButtonSize = 'normal'): string {
  return classes(
    'inline-flex items-center justify-center gap-2 rounded border text-center font-semibold no-underline',
    'disabled:border-rule-2 disabled:bg-transparent disabled:text-ink-2 print:hidden',
    KINDS[kind],
    SIZES[size],
  )
}
