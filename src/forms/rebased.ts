/**
 * What somebody entered, on top of what another stored meanwhile: theirs where they changed what they
 * saw, the stored value everywhere else, so that nobody undoes a correction that they never looked at.
 */
export function rebased<T extends object>(mine: T, seen: object, stored: object): T {
  const before = seen as Record<string, unknown>
  const now = stored as Record<string, unknown>
  return Object.fromEntries(
    Object.entries(mine).map(([field, value]) => [
      field,
      field in now && value === before[field] ? now[field] : value,
    ]),
  ) as T
}
