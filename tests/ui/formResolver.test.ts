import { expect, test } from 'vitest'
import { z } from 'zod'
import { formResolver } from '../../src/forms/formResolver.ts'

const schema = z.object({
  name: z.string().min(1),
  limit: z.number().positive(),
  unit: z.enum(['ppb', 'ppm']),
  analytes: z.array(z.object({ massGPerMol: z.number() })),
})
const options = { fields: {}, shouldUseNativeValidation: false }

async function check(values: unknown, numberFields: string[] = []) {
  const resolver = formResolver(schema, new Set(numberFields))
  return resolver(values as z.input<typeof schema>, undefined, options)
}

test('values that the schema accepts come through', async () => {
  const values = { name: 'North', limit: 5, unit: 'ppb', analytes: [{ massGPerMol: 17.031 }] }
  expect(await check(values, ['limit'])).toEqual({ values, errors: {} })
})

test('a blank entry is asked for in plain words', async () => {
  const { errors } = await check({ name: '', limit: undefined, unit: undefined, analytes: [] })
  expect(errors).toMatchObject({
    name: { message: 'Fill this in.' },
    limit: { message: 'Fill this in.' },
    unit: { message: 'Choose one.' },
  })
})

test('a number outside its bounds is told the bound', async () => {
  const { errors } = await check({ name: 'North', limit: -1, unit: 'ppb', analytes: [] })
  expect(errors).toMatchObject({ limit: { message: 'Give more than 0.' } })
})

test('text that no number could be read from is named, also in a list', async () => {
  const { values, errors } = await check(
    { name: 'North', limit: '1,180', unit: 'ppb', analytes: [{ massGPerMol: 'heavy' }] },
    ['limit', 'analytes.0.massGPerMol'],
  )
  expect(values).toEqual({})
  expect(errors).toMatchObject({
    limit: { message: '"1,180" can be read in two ways. Write 1180 or 1.180.' },
    analytes: [{ massGPerMol: { message: expect.stringContaining('"heavy" is not a number') } }],
  })
})
