import { z } from 'zod'

/** A key made by the client or the server. */
export const id = z.uuid({ error: 'This is not a valid key.' })

/** An instant on the wire: UTC, ISO 8601. */
export const instant = z.iso.datetime()

/** Text that a person typed: trimmed, not empty, no control characters, bounded. */
export const words = (max: number) =>
  z
    .string({ error: 'Please fill this in.' })
    .trim()
    .min(1, 'Please fill this in.')
    .max(max, `At most ${max} characters.`)
    .regex(/^(?:[^\p{Cc}]|[\n\r\t])*$/u, 'This holds characters that cannot be stored.')

/** Why a saved record changes. */
export const reasonForChange = words(500)

/** Paging by key: rows after this one, in the order that was asked for. */
export const page = z.object({
  after: z.string().max(200).optional(),
  limit: z
    .string()
    .regex(/^\d{1,3}$/)
    .transform(Number)
    .pipe(z.number().int().min(1).max(200))
    .optional(),
})

/** A page of rows, how many there are in all, and the key to go on with. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), total: z.number().int(), next: z.string().nullable() })

/** The caution that travels with whatever carries a result. */
export const caution = z.object({ title: z.string(), text: z.string() })
