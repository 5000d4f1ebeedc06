/** Code units per slice; a slice's bytes are at most three times as many. */
const SLICE = 65_536

/** The source as bytes in chunks: a text is encoded slice by slice, never splitting a character. */
export async function* bytesOf(
  source: string | AsyncIterable<Uint8Array>,
): AsyncGenerator<Uint8Array> {
  if (typeof source !== 'string') {
    yield* source
    return
  }
  const encoder = new TextEncoder()
  for (let from = 0; from < source.length; ) {
    let to = Math.min(from + SLICE, source.length)
    const last = source.charCodeAt(to - 1)
    if (to < source.length && last >= 0xd800 && last <= 0xdbff) to++
    yield encoder.encode(source.slice(from, to))
    from = to
  }
}
