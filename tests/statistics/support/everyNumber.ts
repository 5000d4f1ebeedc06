/** Every number of an answer, however deep, with its path; functions are left out. */
export function everyNumber(answer: unknown, path = ''): { path: string; value: number }[] {
  if (typeof answer === 'number') return [{ path, value: answer }]
  if (answer === null || typeof answer !== 'object') return []
  if (ArrayBuffer.isView(answer)) {
    return Array.from(answer as unknown as ArrayLike<number>, (value, i) => ({
      path: `${path}[${i}]`,
      value,
    }))
  }
  return Object.entries(answer).flatMap(([key, value]) => everyNumber(value, `${path}.${key}`))
}
