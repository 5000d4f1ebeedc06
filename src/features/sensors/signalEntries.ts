import type { Entry } from '../../forms/entries.ts'

/** Boxes of the calibration page. */
export const SIGNAL_ENTRIES = {
  signal: {
    label: 'Signal',
    hint: 'Mean of the readings, in the unit of the standards',
    start: '',
    optional: true,
  },
  signalReadings: {
    label: 'Readings averaged',
    start: '1',
    optional: false,
    refuse: (value: number) =>
      Number.isSafeInteger(value) && value >= 1 ? null : 'A whole number from 1 on.',
  },
  limitPercent: {
    label: 'Acceptable residual',
    unit: '%',
    hint: 'Of the level, either way',
    start: '5',
    optional: false,
    refuse: (value: number) => (value > 0 ? null : 'Above 0 %, such as 5.'),
  },
} as const satisfies Record<string, Entry>
