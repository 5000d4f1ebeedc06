import type { Classes, Direction } from '../accuracy/Classes.ts'
import { type DelongArea, delongArea } from '../accuracy/delongArea.ts'
import { rocCurve } from '../accuracy/rocCurve.ts'
import type { LevelOption } from '../Interval.ts'
import type { ProportionMethod } from '../proportions/proportionEstimate.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type AccuracyAtCutOff, accuracyAtCutOff } from './accuracyAtCutOff.ts'
import { twoByTwo } from './twoByTwo.ts'

/** One subject's value, outcome and subgroup. */
export type SubgroupValue = { value: number; present: boolean; subgroup: string }

export type SubgroupAccuracy = {
  subgroup: string
  nPresent: number
  nAbsent: number
  /** Null with fewer than `leastPerClass` in a class: counts alone are shown. */
  area: DelongArea | null
  atCutOff: AccuracyAtCutOff
}

/**
 * Area and accuracy at one cut-off in each subgroup, in alphabetical order. Differences between
 * subgroups need a comparison of their own (independentAreas), not a look at two intervals.
 * @param leastPerClass 10 unless given: with fewer there is no headline area
 * @throws StatisticsError 'too-few' (no values), 'non-finite'
 */
export function subgroupAccuracy(
  values: SubgroupValue[],
  {
    direction,
    cutOff,
    leastPerClass = 10,
  }: {
    direction: Direction
    cutOff: number
    leastPerClass?: number
  },
  options: LevelOption & { interval?: ProportionMethod } = {},
): SubgroupAccuracy[] {
  if (values.length === 0) throw new StatisticsError('too-few', 'There are no values.')
  const groups = new Map<string, { present: number[]; absent: number[] }>()
  for (const { value, present, subgroup } of values) {
    const group = groups.get(subgroup) ?? { present: [], absent: [] }
    groups.set(subgroup, group)
    ;(present ? group.present : group.absent).push(value)
  }
  return [...groups]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([subgroup, { present, absent }]) => {
      const classes: Classes = { present, absent, direction }
      const enough = present.length >= leastPerClass && absent.length >= leastPerClass
      return {
        subgroup,
        nPresent: present.length,
        nAbsent: absent.length,
        area: enough ? delongArea(rocCurve(classes), options) : null,
        atCutOff: accuracyAtCutOff(twoByTwo(classes, cutOff), options),
      }
    })
}
