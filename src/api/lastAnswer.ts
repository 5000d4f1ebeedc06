let lastAnswerAt = Date.now()

/** Each answer of the server means that the login lives on: its idle time begins anew. */
export function noteAnswer(): void {
  lastAnswerAt = Date.now()
}

/** Milliseconds since the server last answered this page. */
export const sinceLastAnswerMs = (): number => Date.now() - lastAnswerAt
