/** Where the first line's text starts in bytes[from, to): after UTF-8's byte order mark, if any. */
export function withoutByteOrderMark(bytes: Uint8Array, from: number, to: number): number {
  const marked =
    to - from >= 3 && bytes[from] === 0xef && bytes[from + 1] === 0xbb && bytes[from + 2] === 0xbf
  return marked ? from + 3 : from
}
