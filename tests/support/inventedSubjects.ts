import type { GivenSubject } from './earlierData.ts'

/** Numbers from a small generator with a fixed seed (Park & Miller 1988, Commun ACM 31:1192). */
function generator(seed: number): () => number {
  let state = seed
  return () => {
    state = (state * 48_271) % 2_147_483_647
    return state / 2_147_483_647
  }
}

/**
 * Invented subjects with ammonia in ppb: log-normal, higher with the condition, a reference analyser
 * beside it; here and there a value or a decision is missing.
 */
export function inventedSubjects(many: number): GivenSubject[] {
  const uniform = generator(20_261)
  const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform())
  return Array.from({ length: many }, (_, at): GivenSubject => {
    const present = uniform() < 0.4
    const ammonia = Math.round(Math.exp(6.7 + (present ? 0.55 : 0) + 0.5 * normal()))
    const reference = Math.round(ammonia * (1 + 0.06 * normal()) + 12)
    return {
      outcome: at % 29 === 0 ? 'indeterminate' : present ? 'present' : 'absent',
      sessions: [
        {
          sensor: at % 23 === 0 ? {} : { ammonia },
          reference: at % 11 === 0 ? {} : { ammonia: reference },
        },
      ],
    }
  })
}
