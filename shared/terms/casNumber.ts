/**
 * Whether a text is a CAS registry number: two to seven digits, two digits, and a check digit that
 * is the sum of the digits, each times its place counted from the right, modulo 10.
 * Source: Chemical Abstracts Service, check digit of CAS registry numbers (from memory).
 */
export function isCasNumber(text: string): boolean {
  const match = /^([1-9]\d{1,6})-(\d{2})-(\d)$/.exec(text)
  if (!match) return false
  const digits = [...`${match[1]}${match[2]}`].reverse()
  const sum = digits.reduce((total, digit, index) => total + Number(digit) * (index + 1), 0)
  return sum % 10 === Number(match[3])
}
