import type { InstrumentData } from '../settings/InstrumentData.ts'
import type { Recording } from '../TraceColumns.ts'
import { TraceError } from '../TraceError.ts'
import { decodeText } from './decodeText.ts'
import { GAS_NAME } from './gasName.ts'
import { isInstant } from './isInstant.ts'

/** What a `#` line says: something of the recording, or of the instrument for one gas. */
export type KeyLine =
  | { about: 'recording'; key: keyof Recording; value: string }
  | { about: 'gas'; key: keyof InstrumentData; gas: string; value: number }

const RECORDING_KEYS = {
  instrument_serial: 'instrumentSerial',
  started_at: 'startedAt',
  firmware: 'firmware',
} as const
const GAS_KEYS = {
  transport_delay_s: 'transportDelayS',
  lod_ppb: 'lodPpb',
  range_max_ppb: 'rangeMaxPpb',
  response_t10_90_s: 'responseT1090S',
} as const
const LONGEST_VALUE = 64
const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/

/**
 * What the line bytes[from, to), which starts with `#`, says.
 * @throws TraceError where it has no key, a key that is not listed, or a value that is not allowed.
 * People write names into comments: the line is never quoted.
 */
export function readKeyLine(bytes: Uint8Array, from: number, to: number, line: number): KeyLine {
  const text = decodeText(bytes, from + 1, to, line, 1)
  const [, key, value] = /^[ \t]*([^:]*?)[ \t]*:[ \t]*(.*?)[ \t]*$/.exec(text) ?? []
  if (key === undefined || value === undefined) {
    throw new TraceError(line, 1, 'A line that starts with # carries a key, a colon and a value.')
  }
  if (Object.hasOwn(RECORDING_KEYS, key)) {
    return {
      about: 'recording',
      key: RECORDING_KEYS[key as keyof typeof RECORDING_KEYS],
      value: soundValue(key, value, line),
    }
  }
  const [, gas, what] = /^(.+)_(transport_delay_s|lod_ppb|range_max_ppb|response_t10_90_s)$/.exec(
    key,
  ) ?? ['']
  if (!gas || !GAS_NAME.test(gas)) {
    throw new TraceError(
      line,
      1,
      'This key is not allowed; allowed are instrument_serial, started_at, firmware and a gas followed by _transport_delay_s, _lod_ppb, _range_max_ppb or _response_t10_90_s.',
    )
  }
  return {
    about: 'gas',
    gas,
    key: GAS_KEYS[what as keyof typeof GAS_KEYS],
    value: soundNumber(what as keyof typeof GAS_KEYS, value, line),
  }
}

function soundValue(key: string, value: string, line: number): string {
  if (value === '') throw new TraceError(line, 1, 'The key has no value.')
  if (value.length > LONGEST_VALUE || /\p{C}/u.test(value)) {
    throw new TraceError(line, 1, `The value is at most ${LONGEST_VALUE} visible characters.`)
  }
  if (key === 'started_at' && !isInstant(value)) {
    throw new TraceError(
      line,
      1,
      'The start is a date and time with its offset, such as 2025-03-04T09:30:00+01:00.',
    )
  }
  return value
}

function soundNumber(what: keyof typeof GAS_KEYS, text: string, line: number): number {
  const value = DECIMAL.test(text) ? Number(text) : Number.NaN
  if (!Number.isFinite(value)) {
    throw new TraceError(line, 1, 'The value is no plain decimal number.')
  }
  if (what !== 'transport_delay_s' && value < 0) {
    throw new TraceError(line, 1, 'The value cannot be negative.')
  }
  return value
}
