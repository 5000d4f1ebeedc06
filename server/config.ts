import { z } from 'zod'

const port = z
  .string()
  .regex(/^\d{1,5}$/)
  .transform(Number)
  .pipe(z.number().int().max(65535))
const minutes = z
  .string()
  .regex(/^\d{1,6}$/)
  .transform(Number)

/** The environment that the API reads; nothing else is configurable. */
const environment = z
  .object({
    NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
    BREATHMARK_PORT: port.default(4100),
    BREATHMARK_HOST: z.string().default('127.0.0.1'),
    /** The address that people type; sign-in returns there and mails link there. */
    BREATHMARK_PUBLIC_URL: z.url(),
    BREATHMARK_DATABASE_URL: z.string().min(1),
    BREATHMARK_OIDC_ISSUER: z.url(),
    BREATHMARK_OIDC_CLIENT_ID: z.string().min(1),
    BREATHMARK_OIDC_CLIENT_SECRET: z.string().min(1),
    /** The provider is the local stand-in: say so on the screen. */
    BREATHMARK_OIDC_STAND_IN: z.enum(['true', 'false']).default('false'),
    BREATHMARK_SMTP_URL: z.string().min(1),
    BREATHMARK_MAIL_FROM: z.email(),
    /** 32 characters or more; keys for digests and cookies are derived from it. */
    BREATHMARK_SECRET: z.string().min(32),
    BREATHMARK_INSTALLATION_NAME: z.string().default('Breathmark'),
    /** Folder of the built client; where it is empty the client is served by Vite. */
    BREATHMARK_CLIENT_DIR: z.string().optional(),
    BREATHMARK_TLS_CERT: z.string().optional(),
    BREATHMARK_TLS_KEY: z.string().optional(),
    /** How many proxies stand in front, for the caller's address. */
    BREATHMARK_TRUSTED_PROXIES: z.string().regex(/^\d$/).transform(Number).default(0),
    BREATHMARK_IDLE_MINUTES: minutes.default(30),
    BREATHMARK_LOGIN_MINUTES: minutes.default(600),
    /** Pieces of long work that this process does at once. */
    BREATHMARK_JOB_THREADS: z
      .string()
      .regex(/^[1-8]$/, 'A number from 1 to 8.')
      .transform(Number)
      .default(2),
    /** Requests that one address may make in a minute. */
    BREATHMARK_REQUESTS_PER_MINUTE: z
      .string()
      .regex(/^\d{1,6}$/)
      .transform(Number)
      .default(1200),
  })
  .refine((env) => !env.BREATHMARK_TLS_CERT === !env.BREATHMARK_TLS_KEY, {
    message: 'BREATHMARK_TLS_CERT and BREATHMARK_TLS_KEY belong together.',
  })
  .refine(
    (env) =>
      env.NODE_ENV !== 'production' ||
      env.BREATHMARK_PUBLIC_URL.startsWith('https://') ||
      /^http:\/\/(127\.0\.0\.1|localhost|\[::1\])[:/]/.test(`${env.BREATHMARK_PUBLIC_URL}/`),
    { message: 'In production BREATHMARK_PUBLIC_URL must be https:// (loopback excepted).' },
  )

export type Config = z.infer<typeof environment>

/** Reads the environment. @throws Error with one line for each variable that is missing or wrong. */
export function readConfig(source: NodeJS.ProcessEnv): Config {
  const result = environment.safeParse(source)
  if (result.success) return result.data
  const lines = result.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`)
  throw new Error(`The environment is not complete.\n${lines.join('\n')}`)
}

let current: Config | undefined

/** Sets the configuration of this process, once at its start. */
export function setConfig(config: Config): Config {
  current = config
  return config
}

export function config(): Config {
  if (!current) throw new Error('The configuration has not been read.')
  return current
}
