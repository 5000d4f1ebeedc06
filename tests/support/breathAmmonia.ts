import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { GivenSubject } from './earlierData.ts'

const FOLDER = join(import.meta.dirname, '../statistics/references')

/** 240 synthetic subjects: ammonia, and isoprene under the second analyte's key; two sites, two sexes. */
export function breathAmmonia(): GivenSubject[] {
  const [, ...lines] = readFileSync(join(FOLDER, 'data/breath-ammonia.csv'), 'utf8')
    .trim()
    .split(/\r?\n/)
  return lines.map((line) => {
    const [, label, ammonia, isoprene, belowLod, site, sex] = line.split(',')
    return {
      outcome: label === '1' ? 'present' : 'absent',
      site: site === 'A' ? 'north' : 'south',
      sex: sex === 'M' ? 'M' : 'F',
      covariates: { group: site! },
      sessions: [
        {
          sensor: {
            ammonia: { value: Number(ammonia), belowLod: belowLod === '1' },
            ...(isoprene ? { acetone: Number(isoprene) } : {}),
          },
        },
      ],
    }
  })
}

/** What R 4.2.2 gave for these subjects (tests/statistics/references/SOURCES.md). */
export function breathAmmoniaReference<T>(marker: string, quantity: string): T {
  const path = join(FOLDER, 'results/roc-breath-ammonia.json')
  const { records } = JSON.parse(readFileSync(path, 'utf8')) as {
    records: { marker: string; quantity: string; value: T }[]
  }
  const found = records.find((each) => each.marker === marker && each.quantity === quantity)
  if (!found) throw new Error(`No ${quantity} of ${marker}.`)
  return found.value
}
