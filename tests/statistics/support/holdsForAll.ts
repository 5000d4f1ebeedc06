import fc from 'fast-check'

/** Runs a synchronous check on many examples; fails with the smallest that breaks it. */
export function holdsForAll<T>(examples: fc.Arbitrary<T>, check: (example: T) => void): void {
  // the property is synchronous, so there is no promise to wait for
  void fc.assert(
    fc.property(examples, (example) => {
      check(example)
    }),
  )
}
