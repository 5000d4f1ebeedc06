import type { SensorMethod } from '#shared/statistics/sensor/SENSOR_METHODS.ts'

export type SensorPart = {
  /** In the address: /sensor/calibration. */
  key: 'calibration' | 'detection' | 'noise' | 'uncertainty' | 'trace' | 'conversions'
  label: string
  methods: readonly SensorMethod[]
}

/** What the sensor page works out. */
export const SENSOR_PARTS: readonly [SensorPart, ...SensorPart[]] = [
  { key: 'calibration', label: 'Calibration', methods: ['line', 'lackOfFit', 'inverse'] },
  { key: 'detection', label: 'Detection limits', methods: ['detection', 'limitOfBlank'] },
  { key: 'noise', label: 'Noise over time', methods: ['allan', 'allanMinimum'] },
  { key: 'uncertainty', label: 'Uncertainty of a session', methods: ['uncertainty'] },
  { key: 'trace', label: 'Breath trace', methods: ['uncertainty'] },
  { key: 'conversions', label: 'Conversions', methods: [] },
]
