import { TraceError } from '../TraceError.ts'

/**
 * The text in bytes[from, to).
 * @throws TraceError where the bytes are not UTF-8, at the cell that holds them
 */
export function decodeText(
  bytes: Uint8Array,
  from: number,
  to: number,
  line: number,
  column: number,
): string {
  let text: string
  try {
    text = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(
      bytes.subarray(from, to),
    )
  } catch {
    throw new TraceError(line, column, 'The file is not UTF-8; save it as UTF-8.')
  }
  if (text.includes('\0')) {
    throw new TraceError(line, column, 'There are NUL bytes; save the file as UTF-8, not UTF-16.')
  }
  if (text.includes('\r')) {
    throw new TraceError(
      line,
      column,
      'A carriage return stands alone; lines end with a line feed, or with both.',
    )
  }
  return text
}
