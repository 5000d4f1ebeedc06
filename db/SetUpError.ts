/**
 * Something outside the program is in its way: a busy port, a missing package, no right to write.
 * The message is one sentence for the person at the terminal and is shown without a stack.
 */
export class SetUpError extends Error {
  override name = 'SetUpError'
}
