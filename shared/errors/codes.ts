/** Every code that the product can answer with, its HTTP status and the sentence a person reads. */
export const ERROR_CODES = {
  'not-signed-in': [401, 'Please sign in.'],
  'signature-needed': [401, 'Please sign in again to sign this.'],
  'not-allowed': [403, 'Your role in this study does not include this.'],
  'own-request': [403, 'Somebody other than the person who asked has to decide this.'],
  'own-membership': [403, 'Nobody changes their own place in the team. Ask another study lead.'],
  'cross-site': [403, 'The request did not come from this site.'],
  'not-found': [404, 'There is nothing here, or you have no access to it.'],
  'no-such-route': [404, 'There is no such address.'],
  'changed-meanwhile': [409, 'Somebody changed this meanwhile. Look at both versions and choose.'],
  'somebody-else': [
    409,
    'Somebody else has signed in in this browser since you opened this page. Nothing was changed.',
  ],
  'already-exists': [409, 'This already exists.'],
  'not-in-this-state': [409, 'This cannot be done in the present state.'],
  'wrong-kind-of-study': [409, 'This does not apply to this kind of study.'],
  'too-large': [413, 'This is too large.'],
  'unsupported-type': [415, 'This type of content is not accepted here.'],
  invalid: [422, 'Some entries need attention.'],
  'nothing-differs': [422, 'Nothing differs from what is stored.'],
  'reason-required': [422, 'Say why this saved record changes.'],
  'unreadable-file': [422, 'The file could not be read.'],
  'statistics-refused': [422, 'The figures cannot be computed from these data.'],
  locked: [423, 'The data are locked. Nothing was changed.'],
  'too-many': [429, 'Too many requests. Please wait a moment.'],
  internal: [500, 'Something went wrong on our side. Nothing was changed.'],
  busy: [503, 'The database is busy. Nothing was changed. Please try again.'],
} as const satisfies Record<string, readonly [number, string]>

export type ErrorCode = keyof typeof ERROR_CODES
