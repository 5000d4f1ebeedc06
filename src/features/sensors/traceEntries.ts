import { defaultSettings } from '#shared/breath/settings/defaultSettings.ts'
import type { Entry } from '../../forms/entries.ts'

/** The numbers that somebody may set; they begin at the protocol's defaults. */
export const TRACE_ENTRIES = {
  targetFlowMlS: {
    label: 'Target flow',
    unit: 'mL/s',
    hint: 'Judged only where the file records flow',
    start: String(defaultSettings.targetFlowMlS),
    optional: false,
    refuse: (value: number) => (value > 0 ? null : 'Above 0 mL/s, such as 50.'),
  },
  calibrationExpandedPercent: {
    label: "Calibration's uncertainty",
    unit: '% (k = 2)',
    hint: "From the certificate or your calibration; without it the value's uncertainty is not stated",
    start: '',
    optional: true,
    refuse: (value: number) => (value >= 0 ? null : '0 % or more.'),
  },
} as const satisfies Record<string, Entry>
