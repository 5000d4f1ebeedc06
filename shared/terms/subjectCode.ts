/** ISO/IEC 7064 MOD 37,36: the check character of text over 0–9 and A–Z (hybrid system, one character). */
const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ'
const MODULUS = ALPHABET.length

/**
 * The check character of a text of digits and capital letters; hyphens are skipped.
 * Source: ISO/IEC 7064:2003, hybrid system MOD 37,36.
 * @throws RangeError for any other character
 */
export function checkCharacter(text: string): string {
  let sum = MODULUS
  for (const character of text.replaceAll('-', '')) {
    const value = ALPHABET.indexOf(character)
    if (value < 0) throw new RangeError(`${character} is neither a digit nor a capital letter.`)
    sum = (sum + value) % MODULUS || MODULUS
    sum = (sum * 2) % (MODULUS + 1)
  }
  return ALPHABET[(MODULUS + 1 - sum) % MODULUS]!
}

/**
 * Builds a subject code such as N04-7316-W from a site prefix and a number of four or more digits,
 * or null when the check character would be I or O, which read like 1 and 0: take another number.
 */
export function subjectCode(prefix: string, number: string): string | null {
  const body = `${prefix}-${number}`
  const check = checkCharacter(body)
  return check === 'I' || check === 'O' ? null : `${body}-${check}`
}

/** Whether a typed code is whole: its parts and its check character agree. */
export function isSubjectCode(code: string): boolean {
  const match = /^([A-Z0-9]{2,4}-\d{4,7})-([0-9A-HJ-NP-Z])$/.exec(code)
  return match !== null && checkCharacter(match[1]!) === match[2]
}
