import { type ReactNode, useEffect, useRef, useState } from 'react'
import { classes } from './classes.ts'

type ScrollBoxProps = { label: string; className: string; children: ReactNode }

/** A box whose content may be wider than it is; reachable by keyboard exactly while it scrolls. */
export function ScrollBox({ label, className, children }: ScrollBoxProps) {
  const ref = useRef<HTMLDivElement>(null)
  const [scrolls, setScrolls] = useState(false)
  useEffect(() => {
    const box = ref.current
    if (!box) return
    const measure = () => {
      const style = getComputedStyle(box)
      const across = style.overflowX !== 'visible' && box.scrollWidth > box.clientWidth
      const down = style.overflowY !== 'visible' && box.scrollHeight > box.clientHeight
      setScrolls(across || down)
    }
    const observer = new ResizeObserver(measure)
    observer.observe(box)
    if (box.firstElementChild) observer.observe(box.firstElementChild)
    return () => observer.disconnect()
  }, [])
  return (
    <div
      ref={ref}
      className={classes('relative', className)}
      {...(scrolls ? { role: 'region', 'aria-label': label, tabIndex: 0 } : {})}
    >
      {children}
    </div>
  )
}
