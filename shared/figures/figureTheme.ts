/**
 * Colours of every figure. The roles are those of the screens: copper is the mark and nothing else
 * (the cut-off); present and absent mean the target condition and nothing else.
 */
export interface FigureTheme {
  /** What the figure lies on: holes in open marks and the rim round the cut-off are this colour. */
  surface: string
  ink: string
  /** Axis text and labels: at least 4.5:1 on the surface. */
  inkQuiet: string
  /** Axes: at least 3:1 on the surface. */
  axis: string
  /** Pale lines that only guide the eye. */
  rule: string
  /** Curves and pairs, in the order in which biomarkers are listed: at least 3:1 on the surface. */
  series: readonly [string, string, string, string]
  /** Confidence band of each series, laid under everything. */
  seriesBand: readonly [string, string, string, string]
  copper: string
  /** Words beside the mark. */
  copperText: string
  present: string
  absent: string
}

const light: FigureTheme = {
  surface: '#ffffff',
  ink: '#15262a',
  inkQuiet: '#4b5f64',
  axis: '#74877f',
  rule: '#d3dbd5',
  series: ['#0a5a53', '#7a6200', '#15262a', '#2b7f9e'],
  seriesBand: ['#e0eeeb', '#f1ecd6', '#e3e8e8', '#e0eef3'],
  copper: '#a94a0b',
  copperText: '#6d3006',
  present: '#7a2e7d',
  absent: '#33589d',
}

const night: FigureTheme = {
  surface: '#142124',
  ink: '#e4ece9',
  inkQuiet: '#a9bab6',
  axis: '#6f8785',
  rule: '#2c3d40',
  series: ['#6cc3b5', '#d8bf4c', '#e4ece9', '#6fb9d6'],
  seriesBand: ['#1c3a38', '#38341b', '#2b393b', '#1c343d'],
  copper: '#f09a5c',
  copperText: '#f6c9a5',
  present: '#d58fd8',
  absent: '#8fb0ee',
}

/** Light serves the page and the printed report; night the ward with the lights out. */
export const figureThemes = { light, night } as const
