/**
 * The code points that a TrueType font has a glyph for, read from its cmap table.
 * Source: OpenType specification 1.9, "cmap", subtable formats 4 and 12.
 * @throws RangeError when the font has no Unicode subtable of either format
 */
export function fontCoverage(font: Buffer): (codePoint: number) => boolean {
  const cmap = findTable(font, 'cmap')
  const subtables = Array.from({ length: font.readUInt16BE(cmap + 2) }, (_, at) => {
    const start = cmap + font.readUInt32BE(cmap + 4 + at * 8 + 4)
    return { start, format: font.readUInt16BE(start) }
  })
  const wide = subtables.find(({ format }) => format === 12)
  if (wide) return wideCoverage(font, wide.start)
  const basic = subtables.find(({ format }) => format === 4)
  if (basic) return basicCoverage(font, basic.start)
  throw new RangeError('The font has no Unicode character map')
}

function findTable(font: Buffer, tag: string): number {
  const tables = font.readUInt16BE(4)
  for (let at = 0; at < tables; at += 1) {
    const record = 12 + at * 16
    if (font.toString('latin1', record, record + 4) === tag) return font.readUInt32BE(record + 8)
  }
  throw new RangeError(`The font has no ${tag} table`)
}

/** Format 12: groups of first and last code point, each with the glyph of the first. */
function wideCoverage(font: Buffer, start: number) {
  const groups = Array.from({ length: font.readUInt32BE(start + 12) }, (_, at) => {
    const group = start + 16 + at * 12
    return { first: font.readUInt32BE(group), last: font.readUInt32BE(group + 4) }
  })
  return (codePoint: number) =>
    groups.some(({ first, last }) => codePoint >= first && codePoint <= last)
}

/** Format 4: segments whose glyph is given by a delta or by an array; glyph 0 means none. */
function basicCoverage(font: Buffer, start: number) {
  const segments = font.readUInt16BE(start + 6) / 2
  const endCodes = start + 14
  const startCodes = endCodes + segments * 2 + 2
  const deltas = startCodes + segments * 2
  const offsets = deltas + segments * 2
  return (codePoint: number) => {
    for (let at = 0; at < segments; at += 1) {
      const first = font.readUInt16BE(startCodes + at * 2)
      if (codePoint > font.readUInt16BE(endCodes + at * 2) || codePoint < first) continue
      const delta = font.readUInt16BE(deltas + at * 2)
      const offset = font.readUInt16BE(offsets + at * 2)
      if (offset === 0) return ((codePoint + delta) & 0xffff) !== 0
      return font.readUInt16BE(offsets + at * 2 + offset + (codePoint - first) * 2) !== 0
    }
    return false
  }
}
