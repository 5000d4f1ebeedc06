import { useEffect, useRef, useState } from 'react'

/** The width of an element in CSS pixels as it is laid out, between two bounds; `first` until then. */
export function useMeasuredWidth<E extends HTMLElement>(bounds: {
  least: number
  most: number
  first: number
}) {
  const { least, most, first } = bounds
  const ref = useRef<E>(null)
  const [width, setWidth] = useState(first)
  useEffect(() => {
    const element = ref.current
    if (!element) return
    const observer = new ResizeObserver(([entry]) => {
      const wide = Math.round(entry?.contentRect.width ?? first)
      setWidth(Math.min(most, Math.max(least, wide)))
    })
    observer.observe(element)
    return () => observer.disconnect()
  }, [least, most, first])
  return { ref, width }
}
