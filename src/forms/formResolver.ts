import { zodResolver } from '@hookform/resolvers/zod'
import { type FieldErrors, type FieldValues, get, type Resolver, set } from 'react-hook-form'
import type { z } from 'zod'
import { plainIssue } from './plainIssue.ts'
import { readNumber } from './readNumber.ts'

export type FormSchema = z.ZodType<FieldValues, FieldValues>

/**
 * The schema's verdict in plain words. A number box hands over the text that it could not read;
 * `numberFields` names those boxes, so that the sentence says what was typed.
 */
export function formResolver<S extends FormSchema>(
  schema: S,
  numberFields: ReadonlySet<string>,
): Resolver<z.input<S>, unknown, z.output<S>> {
  const bySchema = zodResolver(schema, { error: plainIssue }) as Resolver<
    z.input<S>,
    unknown,
    z.output<S>
  >
  const resolver: Resolver<z.input<S>, unknown, z.output<S>> = async (values, context, options) => {
    const result = await bySchema(values, context, options)
    const problems = unreadableNumbers(values, numberFields)
    if (problems.length === 0) return result
    const errors = { ...(result.errors as FieldErrors<z.input<S>>) }
    for (const { name, message } of problems) set(errors, name, { type: 'number', message })
    return { values: {}, errors }
  }
  return resolver
}

function unreadableNumbers(values: FieldValues, numberFields: ReadonlySet<string>) {
  return [...numberFields].flatMap((name) => {
    const value: unknown = get(values, name)
    const message = typeof value === 'string' ? readNumber(value).problem : undefined
    return message === undefined ? [] : [{ name, message }]
  })
}
