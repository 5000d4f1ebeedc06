import { TraceError } from '../TraceError.ts'

/**
 * Refuses a first line that starts with UTF-16's byte order mark, of either order.
 * @throws TraceError at line 1, cell 1
 */
export function refuseUtf16(bytes: Uint8Array, from: number, to: number): void {
  const pair = to - from >= 2 ? (bytes[from]! << 8) | bytes[from + 1]! : 0
  if (pair === 0xfffe || pair === 0xfeff) {
    throw new TraceError(1, 1, 'The file is UTF-16; save it as UTF-8.')
  }
}
