import type { FigureTable } from './figureTable.ts'
import type { PlanCurveData } from './planCurveTypes.ts'

/** Every point of the lines; lines with the same x share rows. */
export function planCurveTable({ title, x, y, lines }: PlanCurveData): FigureTable {
  const places = [...new Set(lines.flatMap(({ points }) => points.map((point) => point.x)))]
  const found = lines.map(({ points }) => new Map(points.map((point) => [point.x, point.y])))
  return {
    caption: title,
    columns: [
      { key: 'x', label: x.label, unit: x.unit, format: x.format },
      ...lines.map(({ label }, at) => ({
        key: `y${at}`,
        label: lines.length === 1 ? y.label : label,
        unit: y.unit,
        format: y.format,
      })),
    ],
    rows: places
      .sort((a, b) => a - b)
      .map((place) => ({
        x: place,
        ...Object.fromEntries(found.map((line, at) => [`y${at}`, line.get(place) ?? null])),
      })),
  }
}
