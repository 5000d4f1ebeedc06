import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { type ButtonKind, type ButtonSize, buttonLook } from './buttonLook.ts'

type ButtonLinkProps = {
  kind?: ButtonKind
  size?: ButtonSize
  children: ReactNode
  /** For a file that is saved and not shown: its name. */
  download?: boolean | string
} & ({ to: string; href?: undefined } | { href: string; to?: undefined })

/** A link with a button's look: `to` inside the product, `href` for files and the sign-in. */
export function ButtonLink({ kind, size, children, download, to, href }: ButtonLinkProps) {
  const look = buttonLook(kind, size)
  if (to !== undefined) {
    return (
      <Link to={to} className={look}>
        {children}
      </Link>
    )
  }
  return (
    <a href={href} download={download} className={look}>
      {children}
    </a>
  )
}
