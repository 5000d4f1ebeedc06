/** Bytes cut at the given positions (ascending), as a stream hands them out. */
export async function* bytesInChunks(
  bytes: Uint8Array,
  cuts: readonly number[],
): AsyncGenerator<Uint8Array> {
  let from = 0
  for (const cut of [...cuts, bytes.length]) {
    yield bytes.slice(from, cut)
    from = cut
  }
}
