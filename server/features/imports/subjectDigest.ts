import { createHmac, hkdfSync } from 'node:crypto'
import { config } from '#server/config.ts'

/**
 * Digests subject words of one study under a key that only this installation holds: the same word is
 * found again, and without the key no list of guessed words tells whose digest it is. HMAC-SHA-256
 * (RFC 2104) under a key by HKDF (RFC 5869).
 */
export function subjectDigester(studyId: string): (word: string) => string {
  const secret = config().BREATHMARK_SECRET
  const key = Buffer.from(hkdfSync('sha256', secret, studyId, 'breathmark subject word', 32))
  return (word) => createHmac('sha256', key).update(word.normalize('NFC')).digest('hex')
}
