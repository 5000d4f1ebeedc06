import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { valueAxis } from '#shared/figures/valueAxis.ts'
import { readableCutOff } from '../../src/features/analyses/readableCutOff.ts'
import { figureCsv } from '../../src/ui/figureCsv.ts'

describe('the cut-off slider', () => {
  test('gives values that a person can write down', () => {
    const axis = valueAxis([100, 6000])
    expect(readableCutOff(1183.2719, axis)).toBe(1183)
    // One step of the slider moves the value by about 0.001 there.
    expect(readableCutOff(0.2234567, valueAxis([0.03, 2.07]))).toBe(0.223)
  })

  test('loses no step: two neighbouring places never become the same value, on any scale', () => {
    void fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 1e5, noNaN: true }),
        fc.double({ min: 1.01, max: 1e4, noNaN: true }),
        fc.integer({ min: 1, max: 998 }),
        fc.constantFrom('log' as const, 'linear' as const),
        (least, ratio, step, kind) => {
          const axis = valueAxis([least, least * ratio], kind)
          const here = readableCutOff(axis.valueAt(step / 1000), axis)
          const next = readableCutOff(axis.valueAt((step + 1) / 1000), axis)
          expect(next).toBeGreaterThan(here)
        },
      ),
    )
  })
})

test('a file of numbers carries its caution and dataset before the first row, and quotes what needs it', () => {
  const text = figureCsv(
    {
      caption: 'Values, by outcome',
      columns: [
        { key: 'name', label: 'Name, in words', format: 'text' },
        { key: 'value', label: 'Value', unit: 'ppb', format: 'concentration' },
      ],
      rows: [
        { name: 'said "present"', value: 0.1234567890123 },
        { name: 'absent', value: null },
      ],
    },
    ['For research use only. Not for diagnosis.', 'Study LARK-2, dataset SHA-256 00ff'],
  )
  expect(text.split('\r\n')).toEqual([
    '# Values, by outcome',
    '# For research use only. Not for diagnosis.',
    '# Study LARK-2, dataset SHA-256 00ff',
    '"Name, in words",Value (ppb)',
    '"said ""present""",0.1234567890123',
    'absent,',
    '',
  ])
})
