/** How many pages a PDF has that our own layout wrote: its page objects stand uncompressed. */
export function pageCount(pdf: Buffer): number {
  const pages = pdf.toString('latin1').match(/\/Type \/Page\b/g)?.length ?? 0
  if (pages === 0) throw new Error('The file has no pages.')
  return pages
}
