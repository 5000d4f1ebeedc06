let openerId: string | undefined

/** Whoever the page found signed in first is its person until it is loaded anew. */
export function noteOpener(personId: string): void {
  openerId ??= personId
}

/** Lets the server refuse a write when somebody else has signed in in this browser since. */
export const openerHeader = (): Record<string, string> =>
  openerId === undefined ? {} : { 'x-breathmark-person': openerId }
