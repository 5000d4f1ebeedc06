import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { areaPower } from '#shared/statistics/planning/areaPower.ts'
import { areaPrecision } from '#shared/statistics/planning/areaPrecision.ts'
import { areaSampleSize } from '#shared/statistics/planning/areaSampleSize.ts'
import { areaSampleSizeAgainstHalf } from '#shared/statistics/planning/areaSampleSizeAgainstHalf.ts'
import { buderer } from '#shared/statistics/planning/buderer.ts'
import { limitsPrecision } from '#shared/statistics/planning/limitsPrecision.ts'
import type { PilotComparison } from '#shared/statistics/planning/PilotComparison.ts'
import { twoAreasPower } from '#shared/statistics/planning/twoAreasPower.ts'
import { twoAreasSampleSize } from '#shared/statistics/planning/twoAreasSampleSize.ts'
import type { Quantities, Surroundings } from './Quantity.ts'
import { classesIn, completeRows } from './rocInput.ts'

export const planningQuantities: Quantities = {
  auc_sample_size: ({ given }) => {
    const plan = {
      alternative: Number(given.auc_alternative),
      null: Number(given.auc_null),
      power: Number(given.power),
      alpha: Number(given.alpha_two_sided),
      absentPerPresent: Number(given.controls_per_case),
    }
    const { finite, asymptotic, binormal } = areaSampleSize(plan)
    const whole = (size: typeof binormal) => ({
      cases_real: size.presentExact,
      cases: size.present,
      controls: size.absent,
    })
    return {
      auc_alternative: plan.alternative,
      auc_null: plan.null,
      power: plan.power,
      alpha_two_sided: plan.alpha,
      controls_per_case: plan.absentPerPresent,
      hanley_mcneil_finite: {
        cases: finite.present,
        controls: finite.absent,
        achieved_power: finite.power,
      },
      hanley_mcneil_asymptotic: whole(asymptotic),
      obuchowski_binormal: whole(binormal),
    }
  },
  auc_power: ({ given }) => {
    const design = {
      alternative: Number(given.auc_alternative),
      null: Number(given.auc_null),
      alpha: Number(given.alpha_two_sided),
      nPresent: Number(given.cases),
      nAbsent: Number(given.controls),
    }
    return {
      auc_alternative: design.alternative,
      auc_null: design.null,
      alpha_two_sided: design.alpha,
      cases: design.nPresent,
      controls: design.nAbsent,
      power: areaPower(design),
    }
  },
  auc_precision: ({ given }) => {
    const plan = {
      area: Number(given.auc),
      halfWidth: Number(given.half_width),
      absentPerPresent: Number(given.controls_per_case),
    }
    const { present, absent, halfWidth } = areaPrecision(plan)
    return {
      auc: plan.area,
      half_width: plan.halfWidth,
      controls_per_case: plan.absentPerPresent,
      cases: present,
      controls: absent,
      achieved_half_width: halfWidth,
    }
  },
  auc_sample_size_vs_half: ({ given }) => {
    const plan = {
      area: Number(given.auc),
      power: Number(given.power),
      alpha: Number(given.alpha_two_sided),
      absentPerPresent: Number(given.controls_per_case),
    }
    const size = areaSampleSizeAgainstHalf(plan)
    return {
      auc: plan.area,
      power: plan.power,
      alpha_two_sided: plan.alpha,
      controls_per_case: plan.absentPerPresent,
      cases_real: size.presentExact,
      controls_real: size.absentExact,
      cases: size.present,
      controls: size.absent,
    }
  },
  two_auc_sample_size: (s) => {
    const number = (name: string, otherwise: number) =>
      Number(new RegExp(`${name} ([\\d.]+)`).exec(s.record.method)?.[1] ?? otherwise)
    const plan = { power: number('power', 0.9), alpha: number('alpha', 0.05) }
    const size = twoAreasSampleSize(pilotOf(s), plan)
    return {
      cases_real: size.presentExact,
      controls_real: size.absentExact,
      cases: size.present,
      controls: size.absent,
    }
  },
  two_auc_power: (s) => {
    const pilot = pilotOf(s)
    return { cases: pilot.nPresent, controls: pilot.nAbsent, power: twoAreasPower(pilot) }
  },
  buderer: ({ given }) => {
    const size = buderer({
      sensitivity: Number(given.sensitivity),
      sensitivityHalfWidth: Number(given.se_half_width),
      specificity: Number(given.specificity),
      specificityHalfWidth: Number(given.sp_half_width),
      prevalence: Number(given.prevalence),
    })
    return {
      sensitivity: given.sensitivity as number,
      se_half_width: given.se_half_width as number,
      specificity: given.specificity as number,
      sp_half_width: given.sp_half_width as number,
      prevalence: given.prevalence as number,
      cases_real: size.presentExact,
      cases: size.present,
      controls_real: size.absentExact,
      controls: size.absent,
      n_for_sensitivity_unrounded_cases: size.totalForSensitivity,
      n_for_sensitivity_rounded_cases: size.totalForSensitivityRounded,
      n_for_specificity_unrounded_controls: size.totalForSpecificity,
      n_for_specificity_rounded_controls: size.totalForSpecificityRounded,
    }
  },
  loa_precision: ({ record }) => {
    const asked = Array.isArray(record.value) ? record.value : []
    return asked.map((entry) => {
      const { n, halfWidthSd, halfWidthSd1999 } = limitsPrecision((entry as { n: number }).n)
      return { n, half_width_in_sd: halfWidthSd, half_width_1999_in_sd: halfWidthSd1999 }
    })
  },
}

/** The two markers stand in the method's text; the pilot is the table of the folder that has both. */
function pilotOf({ record, table, tables }: Surroundings): PilotComparison {
  const named = /\((\w+), (\w+)[,)]/.exec(record.method)
  if (!named) throw new Error('The method names no two markers.')
  const markers = [named[1]!, named[2]!] as const
  const name = tables.find((candidate) =>
    ['label', ...markers].every((column) => table(candidate).has(column)),
  )
  if (name === undefined) throw new Error('No table of this folder has both markers.')
  const complete = completeRows(table(name), [...markers])
  return pairedDelong(
    classesIn(complete, markers[0], 'higher'),
    classesIn(complete, markers[1], 'higher'),
  )
}
