import { figureNumber as n, type Point } from './figureGeometry.ts'

/** Many marks are one path: quick to draw on screen and small in a printed file. */
export type MarkShape = 'disc' | 'diamond' | 'square' | 'triangle' | 'cross'

/** The outline of one mark of about the given radius, about its middle. */
export function markPath(shape: MarkShape, { x, y }: Point, radius: number): string {
  const r = n(radius)
  switch (shape) {
    case 'disc':
      return `M${n(x - radius)} ${n(y)}a${r} ${r} 0 1 1 ${n(2 * r)} 0a${r} ${r} 0 1 1 ${n(-2 * r)} 0z`
    case 'diamond':
      return `M${n(x)} ${n(y - radius)}l${r} ${r}l${-r} ${r}l${-r} ${-r}z`
    case 'square':
      return `M${n(x - r * 0.85)} ${n(y - r * 0.85)}h${n(r * 1.7)}v${n(r * 1.7)}h${n(-r * 1.7)}z`
    case 'triangle':
      return `M${n(x)} ${n(y - r * 1.1)}l${r} ${n(r * 1.85)}h${n(-2 * r)}z`
    case 'cross':
      return `M${n(x - r)} ${n(y)}h${n(2 * r)}M${n(x)} ${n(y - r)}v${n(2 * r)}`
  }
}

export function marksPath(shape: MarkShape, points: readonly Point[], radius: number): string {
  return points.map((point) => markPath(shape, point, radius)).join('')
}
