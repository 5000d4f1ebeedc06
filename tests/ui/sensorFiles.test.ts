import Papa from 'papaparse'
import { describe, expect, test } from 'vitest'
import { allanOf, atInterval } from '../../src/features/sensors/allanOf.ts'
import { suggestedColumn, unitOf } from '../../src/features/sensors/columnHints.ts'
import { numbersIn, readCsv } from '../../src/features/sensors/csvTable.ts'
import { seriesReader } from '../../src/features/sensors/seriesReader.ts'
import { close, textOf, valuesOf } from '../support/sensorSamples.ts'

describe('the sample of a noise series', () => {
  const seriesOf = (text: string, column = 'signal_ppb', pieces = 1) => {
    const data = Papa.parse<string[]>(text, { skipEmptyLines: false }).data
    const reader = seriesReader(column)
    const size = Math.ceil(data.length / pieces)
    for (let at = 0; at < data.length; at += size) reader.take(data.slice(at, at + size))
    return reader.series()
  }

  test('gives the Allan deviations and the minimum, however it is cut into pieces', () => {
    const [overlapping] = valuesOf('allan-1', 'overlapping_allan_deviation')
    const [apart] = valuesOf('allan-1', 'allan_deviation_not_overlapping')
    const outcome = allanOf(seriesOf(textOf('noise-series-1'), 'signal_ppb', 7))
    if (outcome.problem !== null) throw new Error(outcome.problem)
    for (const [points, value] of [
      [outcome.overlapping, overlapping],
      [outcome.apart, apart],
    ] as const) {
      const wanted = value as unknown as { deviation: number[]; terms: number[]; m: number[] }
      expect(points.map(({ m }) => m)).toEqual(wanted.m)
      expect(points.map(({ terms }) => terms)).toEqual(wanted.terms)
      for (const [at, point] of points.entries()) close(point.deviation, wanted.deviation[at]!)
    }
    expect(atInterval(outcome.overlapping, 0.5).map(({ tauS }) => tauS)).toEqual(
      outcome.overlapping.map(({ m }) => m / 2),
    )
  })

  test('with a line that is no number is not computed, and the line is named', () => {
    const lines = textOf('noise-series-1').split('\n')
    lines[41] = 'n/a'
    const outcome = allanOf(seriesOf(lines.join('\n'), 'signal_ppb', 3))
    expect(outcome.problem).toMatch(/not evenly spaced/)
    expect(outcome).toMatchObject({
      refusedCount: 1,
      refused: [{ line: 42, column: 'signal_ppb' }],
    })
  })

  test('names a hundred refused lines at most, and counts all', () => {
    const { refused, refusedCount } = seriesOf(`signal_ppb\n${'x\n'.repeat(5000)}`)
    expect(refused).toHaveLength(100)
    expect(refusedCount).toBe(5000)
  })

  test('that is too short says so', () => {
    expect(allanOf(seriesOf('signal_ppb\n1\n2\n')).problem).toMatch(/at least 3 readings/)
  })
})

describe('a text of columns', () => {
  test.each([
    ['', /nothing to read/],
    ['# a remark\n\n', /nothing to read/],
    ['level,signal\n', /only a line of headings/],
    ['1,2\n3,4\n', /Line 1 holds numbers/],
    ['level,,signal\n1,2,3\n', /column 2 has no heading/],
    ['\nlevel,level\n1,2\n', /Line 2: two columns are called "level"/],
  ])('%j is refused in words', (text, sentence) => {
    expect(readCsv(text)).toEqual({ problem: expect.stringMatching(sentence) })
  })

  test('is read with commas, semicolons or tabs, and passes over remarks and blank lines', () => {
    for (const sign of [',', ';', '\t']) {
      const read = readCsv(`# made up\nlevel${sign}signal\n\n1${sign}2.5\n`)
      expect(read).toEqual({
        table: { headings: ['level', 'signal'], rows: [{ line: 4, cells: ['1', '2.5'] }] },
      })
    }
  })

  test('names every cell that it cannot read by line and column, and takes the other rows', () => {
    const read = readCsv('level_ppb,signal_nA\n50,1.4\n,1.5\n100,"2,1"\n200\n200,3.3\n')
    if ('problem' in read) throw new Error(read.problem)
    const { rows, refused } = numbersIn(read.table, ['level_ppb', 'signal_nA'])
    expect(rows).toEqual([
      [50, 1.4],
      [200, 3.3],
    ])
    expect(refused.map(({ line, column }) => `${line} ${column}`)).toEqual([
      '3 level_ppb',
      '4 signal_nA',
      '5 signal_nA',
    ])
    expect(refused[0]!.why).toBe('blank')
    expect(refused[1]!.why).toMatch(/without a comma/)
    expect(refused[2]!.why).toMatch(/ends before/)
  })

  test('counts lines as an editor does where a quoted cell runs over two', () => {
    const read = readCsv('note,level\n"two\nlines",1\nx,y\n')
    if ('problem' in read) throw new Error(read.problem)
    expect(read.table.rows.map(({ line }) => line)).toEqual([2, 4])
  })

  test('suggests columns by their headings and takes units that stand in them alone', () => {
    expect(suggestedColumn(['run', 'certified_ppm', 'response'], /certified/i, 0)).toBe(
      'certified_ppm',
    )
    expect(suggestedColumn(['a', 'b'], /level/i, -1)).toBe('b')
    expect(unitOf('level (µg/m³)')).toBe('µg/m³')
    expect(unitOf('my_level')).toBeUndefined()
    expect(unitOf('ppb')).toBeUndefined()
  })
})
