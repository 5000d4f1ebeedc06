import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** What a test of one area against a null value (a floor, or 0.5) is planned for. */
export type AreaTestPlan = {
  /** The area expected, and the one to be excluded; both 0.5…1, different. */
  alternative: number
  null: number
  /** Two-sided; 0.05 unless given. */
  alpha?: number
  power: number
  /** Absent per present subject; 1 unless given. */
  absentPerPresent?: number
}

/** The plan with its defaults filled in. @throws StatisticsError 'out-of-range' */
export function areaTestPlan(plan: AreaTestPlan): Required<AreaTestPlan> {
  const { alternative, alpha = 0.05, power, absentPerPresent = 1 } = plan
  for (const area of [alternative, plan.null]) {
    if (!(area >= 0.5 && area < 1)) {
      throw new StatisticsError('out-of-range', 'Areas are planned at or above 0.5 and below 1.')
    }
  }
  if (alternative === plan.null) {
    throw new StatisticsError('out-of-range', 'The area expected equals the one to be excluded.')
  }
  requireProbability(alpha, 'The significance level')
  requireProbability(power, 'The power')
  if (!(absentPerPresent > 0)) {
    throw new StatisticsError('out-of-range', 'The ratio absent to present lies above 0.')
  }
  return { alternative, null: plan.null, alpha, power, absentPerPresent }
}
