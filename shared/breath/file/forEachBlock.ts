import { TraceError } from '../TraceError.ts'
import { bytesOf } from './bytesOf.ts'

const NEWLINE = 10
const RETURN = 13
/** Far beyond any header of ours; keeps a file without line ends from filling the memory. */
const LONGEST_LINE = 65_536

/**
 * Takes bytes[from, to): whole lines with their line feeds. Only the file's last line may lack one,
 * and then comes alone.
 */
export type TakeBlock = (bytes: Uint8Array, from: number, to: number) => void

/**
 * Calls `take` for the source in blocks of whole lines, in order, wherever the chunks' boundaries lie.
 * At most one line and one chunk are held in memory.
 * @param line the line that the next block starts with, for errors
 * @throws TraceError at a line longer than 65,536 bytes
 */
export async function forEachBlock(
  source: string | AsyncIterable<Uint8Array>,
  take: TakeBlock,
  line: () => number,
): Promise<void> {
  const held = new Uint8Array(LONGEST_LINE)
  let holding = 0

  const hold = (part: Uint8Array) => {
    if (holding + part.length > LONGEST_LINE) throw tooLong(held, holding, line())
    held.set(part, holding)
    holding += part.length
  }

  for await (const chunk of bytesOf(source)) {
    // A plain view: the loops below then see one kind of array, whatever the stream hands out.
    const bytes = new Uint8Array(chunk.buffer, chunk.byteOffset, chunk.byteLength)
    let from = 0
    const firstEnd = bytes.indexOf(NEWLINE) + 1
    if (holding > 0 && firstEnd > 0) {
      hold(bytes.subarray(0, firstEnd))
      take(held, 0, holding)
      holding = 0
      from = firstEnd
    }
    const lastEnd = firstEnd > 0 ? bytes.lastIndexOf(NEWLINE) + 1 : 0
    if (lastEnd > from) {
      take(bytes, from, lastEnd)
      from = lastEnd
    }
    if (from < bytes.length) hold(bytes.subarray(from))
  }
  if (holding > 0) take(held, 0, holding)
}

function tooLong(held: Uint8Array, holding: number, line: number): TraceError {
  return held.subarray(0, holding).includes(RETURN)
    ? new TraceError(
        line,
        1,
        'Lines end with carriage returns alone; save the file with line feeds.',
      )
    : new TraceError(line, 1, `The line is longer than ${LONGEST_LINE} bytes.`)
}
