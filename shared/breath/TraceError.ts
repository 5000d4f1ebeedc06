/**
 * A trace that cannot be read: where and why. Nothing of the file is quoted, because people write
 * names into files.
 */
export class TraceError extends Error {
  /** Line of the file, from 1; comment lines and the header count. */
  readonly line: number
  /** Cell in that line, from 1. */
  readonly column: number
  /** What is wrong and what would be right, in one sentence. */
  readonly reason: string

  constructor(line: number, column: number, reason: string) {
    super(`Line ${line}, column ${column}: ${reason}`)
    this.name = 'TraceError'
    this.line = line
    this.column = column
    this.reason = reason
  }
}
