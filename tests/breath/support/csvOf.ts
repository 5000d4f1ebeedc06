/** A trace file's text: header, then a line per row, with line feeds and a last one. */
export function csvOf(
  header: readonly string[],
  rows: readonly (readonly (number | string)[])[],
): string {
  return `${[header.join(','), ...rows.map((row) => row.join(','))].join('\n')}\n`
}
