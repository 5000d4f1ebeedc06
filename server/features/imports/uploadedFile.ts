import { isUtf8 } from 'node:buffer'
import { AppError } from '#shared/errors/AppError.ts'

/** First bytes of files that people take for a CSV, and what to do about each. */
const FOREIGN: readonly [bytes: string, sentence: string][] = [
  [
    '504b0304',
    'This is a spreadsheet or an archive. Save the sheet as CSV (UTF-8) and choose that file.',
  ],
  [
    'd0cf11e0',
    'This is a spreadsheet of an old kind. Save the sheet as CSV (UTF-8) and choose that file.',
  ],
  ['25504446', 'This is a PDF. Choose the CSV file that the figures came from.'],
  ['1f8b', 'This is a compressed file. Unpack it and choose the CSV file inside.'],
  ['fffe', 'The file is written in UTF-16. Save it as CSV (UTF-8).'],
  ['feff', 'The file is written in UTF-16. Save it as CSV (UTF-8).'],
]

/**
 * Looks at the bytes, never at the name: plain text in UTF-8 passes.
 * @throws AppError unreadable-file with what the person can do
 */
export function requireText(bytes: Buffer | undefined): Buffer {
  if (!bytes) throw new AppError('invalid', { fields: { file: 'Choose a file.' } })
  if (bytes.length === 0) refuseFile('The file is empty.')
  const start = bytes.subarray(0, 4).toString('hex')
  for (const [foreign, sentence] of FOREIGN) if (start.startsWith(foreign)) refuseFile(sentence)
  if (bytes.includes(0)) refuseFile('This is not a text file. Choose a CSV file.')
  if (!isUtf8(bytes))
    refuseFile('The file is not written in UTF-8. Save it as CSV (UTF-8) and choose it again.')
  if (bytes.toString('utf8', 0, 4096).trim() === '' && bytes.toString('utf8').trim() === '')
    refuseFile('The file holds nothing but blank lines.')
  return bytes
}

/** Refuses the file as a whole, at the field where it was chosen. */
export function refuseFile(sentence: string): never {
  throw new AppError('unreadable-file', { message: sentence, fields: { file: sentence } })
}
