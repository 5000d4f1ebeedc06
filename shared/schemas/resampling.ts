import { z } from 'zod'

const LARGEST_SEED = 2_147_483_647

/** Random draws that repeat: the same seed, dataset and build give the same digits. */
export const resampling = z.object({
  seed: z
    .number({ error: 'Please give a whole number.' })
    .int('A whole number.')
    .min(0, 'At least 0.')
    .max(LARGEST_SEED, 'At most 2,147,483,647.'),
  replicates: z
    .number({ error: 'Please give a whole number.' })
    .int('A whole number.')
    .min(100, 'At least 100.')
    .max(20_000, 'At most 20,000.'),
})
export type ResamplingChoice = z.infer<typeof resampling>

/** What is asked for unless somebody asks otherwise. */
export const USUAL_RESAMPLING: ResamplingChoice = { seed: 1, replicates: 2_000 }
