import type { Express } from 'express'
import request from 'supertest'

const PRODUCT = 'http://127.0.0.1:4173'

/** Keeps cookies and walks redirects between the product (in this process) and the provider (on its port). */
export class Browser {
  readonly setCookies: string[] = []
  readonly #app: Express
  readonly #own = new Map<string, string>()
  readonly #providers = new Map<string, string>()

  constructor(app: Express) {
    this.#app = app
  }

  cookie(name: string): string | undefined {
    return this.#own.get(name)
  }

  cookies(): ReadonlyMap<string, string> {
    return new Map(this.#own)
  }

  take(cookies: ReadonlyMap<string, string>): void {
    for (const [name, value] of cookies) this.#own.set(name, value)
  }

  async get(path: string, cookies?: Record<string, string>) {
    const response = await request(this.#app)
      .get(path)
      .set('cookie', header(cookies ? new Map(Object.entries(cookies)) : this.#own))
    this.#keep(this.#own, (response.get('set-cookie') ?? []) as string[])
    return response
  }

  post(path: string, body: object = {}) {
    return this.bare('post', path, { 'x-breathmark': '1' }, body)
  }

  /** A write with just these headers. */
  async bare(method: 'post', path: string, headers: Record<string, string>, body: object = {}) {
    const response = await request(this.#app)
      [method](path)
      .set('cookie', header(this.#own))
      .set(headers)
      .send(body)
    this.#keep(this.#own, (response.get('set-cookie') ?? []) as string[])
    return response
  }

  /** Signs in as an account of the stand-in. @returns the path on which the product lets the browser land */
  async signIn(subject: string, returnTo: string): Promise<string> {
    const callback = await this.#toCallback(
      `/auth/login?returnTo=${encodeURIComponent(returnTo)}`,
      subject,
    )
    return (await this.follow(callback)).location
  }

  /** Authenticates again for a signature. */
  async signAgain(subject: string, purpose: string, returnTo: string): Promise<string> {
    const callback = await this.#toCallback(
      `/auth/sign?purpose=${encodeURIComponent(purpose)}&returnTo=${encodeURIComponent(returnTo)}`,
      subject,
    )
    return (await this.follow(callback)).location
  }

  signInUpToCallback(subject: string): Promise<string> {
    return this.#toCallback('/auth/login', subject)
  }

  /** One step on the product's side. */
  async follow(path: string): Promise<{ status: number; location: string }> {
    const response = await this.get(path)
    return { status: response.status, location: response.get('location') ?? '' }
  }

  async #toCallback(path: string, subject: string): Promise<string> {
    let url = (await this.follow(path)).location
    for (let steps = 0; steps < 10; steps++) {
      const answer = await this.#atProvider('GET', url)
      const next = answer.headers.get('location')
      if (!next) {
        // The sign-in page: choose the account.
        const chosen = await this.#atProvider('POST', url, new URLSearchParams({ subject }))
        url = new URL(chosen.headers.get('location')!, url).href
      } else url = new URL(next, url).href
      if (url.startsWith(PRODUCT)) return url.slice(PRODUCT.length)
    }
    throw new Error('The provider sends the browser round in circles.')
  }

  async #atProvider(method: string, url: string, body?: URLSearchParams): Promise<Response> {
    const response = await fetch(url, {
      method,
      redirect: 'manual',
      headers: { cookie: header(this.#providers) },
      ...(body ? { body } : {}),
    })
    this.#keep(this.#providers, response.headers.getSetCookie())
    return response
  }

  #keep(jar: Map<string, string>, lines: string[]): void {
    for (const line of lines) {
      if (jar === this.#own) this.setCookies.push(line)
      const [pair = '', ...attributes] = line.split(';')
      const at = pair.indexOf('=')
      const name = pair.slice(0, at)
      const gone = attributes.some((each) => /expires=Thu, 01 Jan 1970/i.test(each))
      if (gone) jar.delete(name)
      else jar.set(name, pair.slice(at + 1))
    }
  }
}

const header = (jar: ReadonlyMap<string, string>): string =>
  [...jar].map(([name, value]) => `${name}=${value}`).join('; ')
