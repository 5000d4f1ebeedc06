/** A gas's name: small letters and digits in words joined by single underscores, at most 40 long. */
export const GAS_NAME = /^(?=.{1,40}$)[a-z0-9]+(_[a-z0-9]+)*$/
