import { generateKeyPairSync, randomBytes } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

export type LocalSecrets = {
  /** Keys of digests and cookies are derived from it. */
  application: string
  /** With which the application shows itself to the stand-in provider. */
  client: string
  /** RSA key of the stand-in provider, PEM; kept so that who is signed in can sign out after a restart. */
  signingKey: string
}

/** Drawn once, kept in a file that only its owner reads. */
export function localSecrets(folder: string): LocalSecrets {
  const file = join(folder, 'secrets.json')
  if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'))
  const { privateKey } = generateKeyPairSync('rsa', {
    modulusLength: 2048,
    publicKeyEncoding: { type: 'spki', format: 'pem' },
    privateKeyEncoding: { type: 'pkcs8', format: 'pem' },
  })
  const secrets: LocalSecrets = {
    application: randomBytes(32).toString('hex'),
    client: randomBytes(24).toString('hex'),
    signingKey: privateKey,
  }
  writeFileSync(file, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 })
  return secrets
}
