/** A box in figure units; y grows downwards. */
export interface Box {
  left: number
  top: number
  right: number
  bottom: number
}

export interface Point {
  x: number
  y: number
}

/** Two decimals are finer than any screen or printer shows. */
export function figureNumber(value: number): number {
  return Math.round(value * 100) / 100
}

export function widthOf(box: Box): number {
  return box.right - box.left
}

export function heightOf(box: Box): number {
  return box.bottom - box.top
}
