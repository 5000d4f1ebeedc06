import { expect, test } from 'vitest'
import { rebased } from '../../src/forms/rebased.ts'

test('an own change stands on top of what another stored in other fields', () => {
  const seen = { sex: 'F', ageBand: '10-14' }
  const stored = { sex: 'M', ageBand: '10-14' }
  expect(rebased({ sex: 'F', ageBand: '30-34', reason: 'Misread' }, seen, stored)).toEqual({
    sex: 'M',
    ageBand: '30-34',
    reason: 'Misread',
  })
})

test('where both changed the same field, the own value is the one to put in its place', () => {
  expect(rebased({ planned: 12 }, { planned: 10 }, { planned: null })).toEqual({ planned: 12 })
})

test('what another emptied stays empty where it was not touched', () => {
  expect(rebased({ planned: 10 }, { planned: 10 }, { planned: null })).toEqual({ planned: null })
})
