import { describe, expect, test } from 'vitest'
import { BLINDING, maySee } from '#shared/policy/informationClasses.ts'
import { DUTIES, DUTIES_OF_ROLE, ROLES } from '#shared/policy/people.ts'
import { ACTIONS, policyRow } from '#shared/policy/permissions.ts'

describe('the policy table against the blinding table', () => {
  test('no grant reveals a class that its duty may not see', () => {
    const wrong = ACTIONS.flatMap((action) => {
      const row = policyRow(action)
      if (row.reveals === 'none') return []
      return (
        row.grants
          .filter((grant) => grant.scope !== 'installation')
          // In an earlier-data study nobody is blinded; such actions exist nowhere else.
          .filter((grant) => row.onlyKind !== 'earlierData' || !grant.afterRelease)
          .filter(
            (grant) => !maySee(grant.role, grant.duty, row.reveals, grant.afterRelease === true),
          )
          .map((grant) => `${action}: ${grant.role} ${grant.duty} sees ${row.reveals}`)
      )
    })
    expect(wrong).toEqual([])
  })

  test('every write says what a lock does to it and which event it leaves in the trail', () => {
    const silent = ACTIONS.filter((action) => {
      const row = policyRow(action)
      return row.effect === 'write' && !(row.whenLocked && row.records)
    })
    expect(silent).toEqual([])
  })

  test('a lock stops no reading, and reading stops no writing', () => {
    const odd = ACTIONS.filter((action) => {
      const row = policyRow(action)
      return row.effect !== 'write' && (row.whenLocked === 'refuse' || row.guard)
    })
    expect(odd).toEqual([])
  })

  test('every grant pairs a role with a duty of that role', () => {
    const odd = ACTIONS.flatMap((action) =>
      policyRow(action)
        .grants.filter(
          ({ duty, role }) => duty && !(DUTIES_OF_ROLE[role] as readonly string[]).includes(duty),
        )
        .map((grant) => `${action}: ${grant.role} ${grant.duty}`),
    )
    expect(odd).toEqual([])
  })
})

describe('the blinding table', () => {
  test('has a row for every duty and for the analyst', () => {
    expect(Object.keys(BLINDING).sort()).toEqual([...DUTIES, 'analyst'].sort())
  })

  test.each([
    // The table of docs/decisions on blinding, written out by hand.
    ['coordinator', 'bedside', 'index', 'before'],
    ['coordinator', 'bedside', 'reference', 'after'],
    ['coordinator', 'bedside', 'linked', 'after'],
    ['coordinator', 'reference', 'index', 'after'],
    ['coordinator', 'reference', 'reference', 'before'],
    ['coordinator', 'reference', 'linked', 'after'],
    ['coordinator', 'siteLead', 'index', 'after'],
    ['coordinator', 'studyLead', 'reference', 'after'],
    ['monitor', 'verifyIndex', 'index', 'before'],
    ['monitor', 'verifyIndex', 'reference', 'never'],
    ['monitor', 'verifyIndex', 'linked', 'never'],
    ['monitor', 'verifyReference', 'index', 'never'],
    ['monitor', 'verifyReference', 'reference', 'before'],
    ['monitor', 'oversight', 'index', 'never'],
    ['monitor', 'oversight', 'reference', 'never'],
  ] as const)('a %s on %s sees %s values: %s', (role, duty, informationClass, when) => {
    expect(maySee(role, duty, informationClass, false)).toBe(when === 'before')
    expect(maySee(role, duty, informationClass, true)).toBe(when !== 'never')
  })

  test('a person without a line of the team list sees no class at all', () => {
    for (const role of ROLES)
      for (const informationClass of ['index', 'reference'] as const)
        expect(maySee(role, null, informationClass, true)).toBe(false)
  })
})
